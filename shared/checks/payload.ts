import { isAbove } from '../motion/exact'
import type { Nameplate } from '../settings/nameplate'
import { answers } from './answers'
import { about, quantity } from './format'
import { atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, unknown } = answers('payload')

export const payload: Rule = {
  id: 'payload',
  title: 'Payload',
  reason: 'More than the unit may carry wears its guide and its screw, and upright it may not be held.',
  formula: 'payloadMass <= 1/((1 − s)/maxPayloadLevel + s/maxPayloadVertical), s = |sin mountingAngle|; rotary: payloadInertia <= maxPayloadInertia',
  levels: ['stop', 'unknown'],
  applies: () => true,
  judge,
}

function judge({ content: { axisKind, setup }, nameplate }: JudgeInput): CheckResult[] {
  return axisKind === 'rotary'
    ? against(setup.payloadInertia, 'payloadInertia', 'kg·cm²', nameplate?.maxPayloadInertia, ['nameplate.maxPayloadInertia'], '')
    : carried(setup.payloadMass, setup.mountingAngle, nameplate ?? {})
}

type Most = Pick<Nameplate, 'maxPayloadLevel' | 'maxPayloadVertical'>

function against(load: number | undefined, field: 'payloadMass' | 'payloadInertia', unit: string, permitted: number | undefined, missing: readonly string[], mounted: string): CheckResult[] {
  if (load === undefined || permitted === undefined) {
    return [unknown('The payload', [...load === undefined ? [field] : [], ...permitted === undefined ? missing : []], [atSetup(field)])]
  }
  if (!isAbove(load, permitted)) return []
  const words = field === 'payloadMass' ? 'The payload' : 'The payload inertia'
  return [stop([atSetup(field)], `${words} of ${quantity(load, unit)} is ${about(load - permitted)} ${unit} more than the ${about(permitted, load)} ${unit} that the unit may carry${mounted}.`, { load, permitted })]
}

function carried(load: number | undefined, angle: number | undefined, plate: Most): CheckResult[] {
  if (angle !== undefined) {
    const { permitted, missing } = permittedAt(angle, plate)
    return against(load, 'payloadMass', 'kg', permitted, missing, ` at ${quantity(angle, 'deg')}`)
  }
  const { maxPayloadLevel: level, maxPayloadVertical: vertical } = plate
  // Within the smaller of the two it is permitted however the axis is mounted.
  const either = level === undefined || vertical === undefined ? undefined : Math.min(level, vertical)
  if (load !== undefined && either !== undefined && load <= either) return []
  const { missing } = permittedAt(45, plate)
  return [unknown('The payload', [...load === undefined ? ['payloadMass'] : [], 'mountingAngle', ...missing], [atSetup('payloadMass')])]
}

/** What may be carried on a slope, between level and upright by the sine; a maximum that counts nothing there is not missed. */
function permittedAt(angle: number, { maxPayloadLevel, maxPayloadVertical }: Most): { permitted?: number, missing: string[] } {
  const s = Math.abs(Math.sin(angle * Math.PI / 180))
  const parts = [
    { share: 1 - s, most: maxPayloadLevel, name: 'nameplate.maxPayloadLevel' },
    { share: s, most: maxPayloadVertical, name: 'nameplate.maxPayloadVertical' },
  ].filter(({ share }) => share > 0)
  const missing = parts.filter(({ most }) => most === undefined).map(({ name }) => name)
  return missing.length > 0 ? { missing } : { missing, permitted: 1 / parts.reduce((sum, { share, most = 1 }) => sum + share / most, 0) }
}
