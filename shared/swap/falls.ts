import { standardGravity } from '../motion/press-force'
import type { Nameplate } from '../settings/nameplate'
import type { AxisFlag, Content } from '../settings/types'

/** Below this slope friction usually holds an axis whose friction nobody measured, deg (common practice, no source). */
const steep = 5

/** Whether how the load is blocked has to be said: gravity is flagged, or the axis is not known to be level. */
export function mayFall(flags: readonly AxisFlag[], { setup, axisKind }: Content): boolean {
  return flags.includes('gravity') || (setup.mountingAngle ?? 0) !== 0 || (axisKind === 'rotary' && (setup.unbalanceTorque ?? 0) !== 0)
}

/**
 * Whether gravity drives the axis back when nothing holds it: m·g·s above the friction, with s = |sin mountingAngle|; rotary
 * the unbalance torque times s. An axis flagged gravity falls whatever its values say, since they may be missing.
 */
export function drivenBack(flags: readonly AxisFlag[], { setup, axisKind }: Content, nameplate: Pick<Nameplate, 'movingMass'> = {}): boolean {
  if (flags.includes('gravity')) return true
  const { mountingAngle = 0, payloadMass = 0, unbalanceTorque = 0 } = setup
  const slope = Math.abs(Math.sin(mountingAngle * Math.PI / 180))
  const friction = axisKind === 'linear' ? setup.frictionForce : setup.frictionTorque
  const pull = axisKind === 'linear' ? (payloadMass + (nameplate.movingMass ?? 0)) * standardGravity * slope : unbalanceTorque * slope
  if (axisKind === 'rotary' && unbalanceTorque === 0) return false
  return friction === undefined ? Math.abs(mountingAngle) >= steep : pull > friction
}
