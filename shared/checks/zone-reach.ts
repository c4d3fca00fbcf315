import { usedRows } from '../motion/chains'
import { minus, plus, remainder } from '../motion/exact'
import type { Content, Zone } from '../settings/types'
import { answers } from './answers'
import { about, axisUnits, numbersInWords, quantity } from './format'
import { softLimits, turnsFreely } from './limits'
import { atSetup, atZone } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, note, unknown } = answers('zone-reach')

/** A zone as a stretch: on a modulo axis `to` may lie beyond the modulo. */
interface Stretch { readonly zone: Zone, readonly index: number, readonly from: number, readonly to: number }

export const zoneReach: Rule = {
  id: 'zone-reach',
  title: 'Reach of the zones',
  reason: 'A zone that the axis never reaches gives its signal never, and one that it crosses between two looks of the controller gives it unseen.',
  formula: 'to < softLimitMin or from > softLimitMax: warn; partly outside, overlapping, or to − from < highest speed · controller scan: note',
  levels: ['warn', 'note', 'unknown'],
  applies: ({ content }) => content.zones.length > 0,
  judge,
}

function judge({ content, axis: { controllerScan } }: JudgeInput): CheckResult[] {
  const stretches = stretchesOf(content)
  const results = [...reach(content, stretches), ...overlaps(stretches, content.setup.modulo), ...narrow(content, stretches, controllerScan)]
  const { missing } = softLimits(content)
  return turnsFreely(content) || missing.length === 0
    ? results
    : [...results, unknown('Whether the axis reaches its zones', missing, missing.map(atSetup))]
}

function stretchesOf({ zones, setup: { modulo } }: Content): Stretch[] {
  return zones.map((zone, index) => ({ zone, index, from: zone.from, to: modulo !== undefined && zone.to < zone.from ? plus(zone.to, modulo) : zone.to }))
}

function reach(content: Content, stretches: readonly Stretch[]): CheckResult[] {
  if (turnsFreely(content)) return []
  const { length } = axisUnits(content.axisKind)
  const { min, max } = softLimits(content)
  return stretches.flatMap(({ zone, index, ...stretch }) => {
    const lies = placed(stretch, min, max, content.setup.modulo)
    if (lies === 'inside') return []
    const say = lies === 'outside' ? warn : note
    const limits = min === undefined ? `up to ${quantity(max ?? 0, length)}` : max === undefined ? `from ${quantity(min, length)} on` : `from ${quantity(min, length)} to ${quantity(max, length)}`
    return [say([atZone(index, 'from'), atZone(index, 'to')],
      `Zone ${zone.zone} from ${quantity(zone.from, length)} to ${quantity(zone.to, length)} lies ${lies === 'outside' ? 'wholly' : 'partly'} outside the soft limits ${limits}.`,
      { zone: zone.zone, from: zone.from, to: zone.to, ...min === undefined ? {} : { min }, ...max === undefined ? {} : { max } })]
  })
}

type Lies = 'inside' | 'partly' | 'outside'

/** Where a stretch lies; a limit that is not given bounds nothing. */
function placed({ from, to }: { readonly from: number, readonly to: number }, min = -Infinity, max = Infinity, modulo?: number): Lies {
  if (modulo === undefined || min === -Infinity || max === Infinity) return to < min || from > max ? 'outside' : from >= min && to <= max ? 'inside' : 'partly'
  // Turned on by whole modulos to the first place at or above the lower limit; what wraps comes in again there.
  const start = plus(min, remainder(minus(from, min), modulo))
  const end = plus(start, minus(to, from))
  const again = plus(min, modulo)
  if (max >= again || end <= max) return 'inside'
  return start > max && end < again ? 'outside' : 'partly'
}

function overlaps(stretches: readonly Stretch[], modulo: number | undefined): CheckResult[] {
  return stretches.flatMap((one, i) => {
    const others = stretches.slice(i + 1).filter(other => overlap(one, other, modulo))
    if (others.length === 0) return []
    const zones = others.map(({ zone }) => zone.zone)
    return [note([one, ...others].flatMap(({ index }) => [atZone(index, 'from'), atZone(index, 'to')]),
      `Zone ${one.zone.zone} overlaps ${zones.length === 1 ? 'zone' : 'zones'} ${numbersInWords(zones)}: their signals are on together there.`,
      { zone: one.zone.zone, zones })]
  })
}

/** Whether two zones share more than a point. */
function overlap(one: Stretch, other: Stretch, modulo: number | undefined): boolean {
  if (modulo === undefined) return one.from < other.to && other.from < one.to
  const ahead = remainder(minus(other.from, one.from), modulo)
  return ahead < minus(one.to, one.from) || plus(ahead, minus(other.to, other.from)) > modulo
}

/** Zones that the fastest move crosses within one scan; the controller's scan is rarely written down, and without it nothing is said. */
function narrow(content: Content, stretches: readonly Stretch[], scan: number | undefined): CheckResult[] {
  const fastest = usedRows(content.moves).reduce((most, { move }) => Math.max(most, move.speed), 0)
  if (scan === undefined || fastest === 0) return []
  const { length, speed } = axisUnits(content.axisKind)
  const least = fastest * scan / 1000
  return stretches.flatMap(({ zone, index, from, to }) => {
    const width = minus(to, from)
    return width >= least
      ? []
      : [note([atZone(index, 'from'), atZone(index, 'to')],
          `Zone ${zone.zone} is ${quantity(width, length)} wide: at ${quantity(fastest, speed)} the axis goes ${about(least, width)} ${length} between two looks of the controller.`,
          { zone: zone.zone, width, least, speed: fastest, scan })]
  })
}
