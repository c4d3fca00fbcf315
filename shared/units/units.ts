import { Exact } from './exact'

/*
 * Every unit that is read, by dimension. The first of each is the canonical one, in which content is kept. Factors are
 * the exact definitions of NIST SP 811 (2008), Appendix B.8 and B.9: inch 25.4 mm, pound 0.45359237 kg, standard
 * gravity 9.80665 m/s²; pound-force and the torques are products of these. Only radians have no finite factor.
 */

/** π to 50 digits after the point. */
export const pi = '3.14159265358979323846264338327950288419716939937511'

/** canonical value = value · times / over */
export interface Unit { readonly name: string, readonly times: Exact, readonly over: Exact }

const one = new Exact(1)
const unit = (name: string, times: string, over?: string): Unit =>
  ({ name, times: new Exact(times), over: over === undefined ? one : new Exact(over) })

const dimensions = {
  length: [unit('mm', '1'), unit('µm', '0.001'), unit('cm', '10'), unit('m', '1000'), unit('in', '25.4')],
  speed: [unit('mm/s', '1'), unit('m/s', '1000'), unit('in/s', '25.4')],
  acceleration: [unit('mm/s²', '1'), unit('m/s²', '1000'), unit('in/s²', '25.4'), unit('g', '9806.65')],
  jerk: [unit('mm/s³', '1')],
  angle: [unit('deg', '1'), unit('rev', '360'), unit('rad', '180', pi)],
  angularSpeed: [unit('deg/s', '1'), unit('rpm', '6'), unit('rad/s', '180', pi)],
  angularAcceleration: [unit('deg/s²', '1'), unit('rad/s²', '180', pi)],
  angularJerk: [unit('deg/s³', '1')],
  force: [unit('N', '1'), unit('kN', '1000'), unit('lbf', '4.4482216152605'), unit('kgf', '9.80665')],
  torque: [unit('N·m', '1'), unit('kgf·cm', '0.0980665'), unit('lbf·in', '0.1129848290276167'), unit('lbf·ft', '1.3558179483314004')],
  mass: [unit('kg', '1'), unit('g', '0.001'), unit('lb', '0.45359237')],
  inertia: [unit('kg·cm²', '1'), unit('kg·m²', '10000'), unit('kg·mm²', '0.01'), unit('g·cm²', '0.001')],
  percent: [unit('%', '1'), unit('‰', '0.1')],
  time: [unit('ms', '1'), unit('µs', '0.001'), unit('s', '1000')],
  frequency: [unit('Hz', '1'), unit('kHz', '1000')],
  rate: [unit('1/s', '1')],
} as const satisfies Record<string, readonly Unit[]>

const byCanonical = new Map<string, readonly Unit[]>(Object.values(dimensions).map(units => [units[0].name, units]))
const names = new Set(Object.values(dimensions).flatMap(units => units.map(each => each.name)))
const respelt = new Map([['Nm', 'N·m'], ['um', 'µm'], ['us', 'µs'], ['°', 'deg'], ['°/s', 'deg/s']])

/**
 * The one spelling of a unit: `mm/s^2` and `mm/s2` become `mm/s²`; `N*m`, `N.m`, `Nm` and U+22C5 become `N·m`; Greek mu
 * becomes the micro sign. An unknown unit comes back as it is, save for these changes.
 */
export function spellUnit(text: string): string {
  const spelt = text.trim()
    .replace(/[*.\u22c5]/g, '·').replaceAll('\u03bc', '\u00b5')
    .replace(/(?<=[a-z])\^?2/g, '²').replace(/(?<=[a-z])\^?3/g, '³')
  return respelt.get(spelt) ?? spelt
}

/** The units that a value kept in this canonical unit may come in, canonical first; none for a bare number (''). */
export function unitsFor(canonical: string): readonly Unit[] {
  return byCanonical.get(canonical) ?? []
}

/** The unit by any of its spellings, if it fits the canonical one; `g` is gravity for mm/s² and gram for kg. */
export function findUnit(text: string, canonical: string): Unit | 'unit-unknown' | 'unit-unfit' {
  const fitting = unitsFor(canonical)
  if (fitting[0]?.name === text) return fitting[0]
  const name = spellUnit(text)
  return fitting.find(each => each.name === name) ?? (names.has(name) ? 'unit-unfit' : 'unit-unknown')
}

/** Every name of a unit, in its one spelling. */
export function unitNames(): readonly string[] {
  return [...names]
}
