import { standardGravity } from '../motion/press-force'
import type { Nameplate } from '../settings/nameplate'
import type { Content } from '../settings/types'
import { answers } from './answers'
import { about, quantity } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('brake-vertical')

/** Below this slope friction usually holds an axis whose friction nobody measured, in deg. */
const steep = 5
const holdingFactor = 1.5

export const brakeVertical: Rule = {
  id: 'brake-vertical',
  title: 'Brake against gravity',
  reason: 'A load that drives its axis back falls when the drive lets go before something else holds it.',
  formula: 'driven back: m g s > Ff (Ff not given: s >= sin 5°), s = |sin mountingAngle|, rotary: unbalanceTorque · s; then no release on enable loss without a brake, brakeEngageDelay >= brakeCloseTime, holding >= 1.5 m g s',
  levels: ['stop', 'warn', 'unknown'],
  // A level axis, or one without anything off its centre, is not driven back.
  applies: ({ content: { axisKind, setup } }) => setup.mountingAngle !== 0 && !(axisKind === 'rotary' && (setup.unbalanceTorque ?? 0) === 0),
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const load = loadOf(content, nameplate)
  if (load.drivesBack === false) return []
  if (load.drivesBack === undefined) return [unknown('Whether gravity drives the axis back', load.missing, [atSetup('mountingAngle')])]
  const brake = hasBrake(content, nameplate)
  const missing: string[] = brake === undefined ? ['brakeFitted'] : []
  const results = brake === undefined ? [] : brake ? engaging(content, nameplate, load, missing) : letGo(content, load, missing)
  return missing.length === 0 ? results : [...results, unknown('The brake', missing, [atSetup('brakeFitted')])]
}

interface Load {
  /** Undefined where it cannot be told. */
  readonly drivesBack: boolean | undefined
  /** m g s in N, or the unbalance in N·m; undefined without a payload. */
  readonly pull?: number
  readonly missing: readonly string[]
  /** What counts as nothing because the nameplate does not tell. */
  readonly without: string
  readonly unit: 'N' | 'N·m'
}

function loadOf({ axisKind, setup }: Content, nameplate: Nameplate | undefined): Load {
  const unit = axisKind === 'linear' ? 'N' : 'N·m'
  const angle = setup.mountingAngle
  if (angle === undefined) return { drivesBack: undefined, missing: ['mountingAngle'], without: '', unit }
  const s = Math.abs(Math.sin(angle * Math.PI / 180))
  const friction = axisKind === 'linear' ? setup.frictionForce : setup.frictionTorque
  const missing = axisKind === 'linear' && setup.payloadMass === undefined ? ['payloadMass'] : []
  const least = axisKind === 'linear' ? ((setup.payloadMass ?? 0) + (nameplate?.movingMass ?? 0)) * standardGravity * s : (setup.unbalanceTorque ?? 0) * s
  const certain = friction === undefined ? Math.abs(angle) >= steep : least > friction
  const without = axisKind === 'linear' && nameplate?.movingMass === undefined ? ', without the moving mass of the unit' : ''
  // More payload only pulls harder: what the known mass does alone holds without it.
  const drivesBack = certain || friction === undefined || missing.length === 0 ? certain : undefined
  return { drivesBack, ...missing.length === 0 ? { pull: least } : {}, missing, without, unit }
}

/** A brake counts where neither the drive nor the nameplate denies it; undefined where neither speaks. */
function hasBrake({ setup }: Content, nameplate: Nameplate | undefined): boolean | undefined {
  if (setup.brakeFitted === false || nameplate?.brakeFitted === false) return false
  return setup.brakeFitted ?? nameplate?.brakeFitted
}

function story({ pull, unit, without }: Load): string {
  return pull === undefined ? 'Gravity drives the axis back' : `Gravity drives the axis back with ${about(pull)} ${unit}${without}`
}

function letGo({ setup: { onEnableLoss } }: Content, load: Load, missing: string[]): CheckResult[] {
  if (onEnableLoss === undefined) missing.push('onEnableLoss')
  if (onEnableLoss === undefined || onEnableLoss === 'stop-and-hold') return []
  return [stop([atSetup('onEnableLoss'), atSetup('brakeFitted')],
    `${story(load)}, and on enable loss the drive lets go (${onEnableLoss}) with no brake to hold it.`,
    { ...load.pull === undefined ? {} : { pull: load.pull }, onEnableLoss })]
}

function engaging({ setup: { brakeEngageDelay } }: Content, nameplate: Nameplate | undefined, load: Load, missing: string[]): CheckResult[] {
  const { brakeCloseTime, brakeHolding } = nameplate ?? {}
  missing.push(...[
    ...brakeEngageDelay === undefined ? ['brakeEngageDelay'] : [], ...brakeCloseTime === undefined ? ['nameplate.brakeCloseTime'] : [],
    ...brakeHolding === undefined ? ['nameplate.brakeHolding'] : [], ...load.missing,
  ])
  const results: CheckResult[] = []
  if (brakeEngageDelay !== undefined && brakeCloseTime !== undefined && brakeEngageDelay < brakeCloseTime) {
    results.push(stop([atSetup('brakeEngageDelay')],
      `${story(load)}, and the drive lets go ${quantity(brakeEngageDelay, 'ms')} after it calls the brake, which takes ${quantity(brakeCloseTime, 'ms')} to close.`,
      { ...load.pull === undefined ? {} : { pull: load.pull }, delay: brakeEngageDelay, closeTime: brakeCloseTime }))
  }
  if (brakeHolding !== undefined && load.pull !== undefined && brakeHolding < holdingFactor * load.pull) {
    const need = holdingFactor * load.pull
    results.push(warn([atSetup('brakeFitted')],
      `${story(load)}; the brake holds ${quantity(brakeHolding, load.unit)}, less than the ${about(need, brakeHolding)} ${load.unit} that are ${quantity(holdingFactor, 'times')} as much.`,
      { pull: load.pull, need, holding: brakeHolding }))
  }
  return results
}
