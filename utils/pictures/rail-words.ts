import { railUnit, type RailInput, type RailMove, type RailSide } from '#shared/pictures/rail-input'
import { listWords } from '../words/lists'
import { figure } from '#shared/pictures/scale'

/** Moves by where they end, for people who read the picture instead of seeing it: "0 and 6 at 5, press 2 from 88 to 104". */
function placesOf(moves: readonly RailMove[]): string {
  const keys = new Map<string, number[]>()
  for (const move of [...moves].sort((a, b) => a.target - b.target)) {
    const place = move.approach === undefined ? `at ${figure(move.target)}` : `from ${figure(move.approach)} to ${figure(move.target)}`
    keys.set(place, [...(keys.get(place) ?? []), move.move])
  }
  return [...keys].map(([place, numbers]) => `${place.startsWith('from') ? 'press ' : ''}${listWords(numbers.map(String))} ${place}`).join(', ')
}

const limitsOf = (side: RailSide) => {
  if (side.softMin === undefined && side.softMax === undefined) return 'no soft limits'
  const named = listWords([side.softMin, side.softMax].filter(limit => limit !== undefined).map(figure))
  return `soft limits ${named}${side.limitsHeld ? '' : ', not held'}`
}

const stepsOf = (side: RailSide, unit: string) => side.steps.map(step => `Move ${step.move} steps by ${figure(step.by)} ${unit}.`).join(' ')

function sideSentence(side: RailSide, unit: string): string {
  const moves = side.moves.length === 0 ? 'No moves.' : `Moves: ${placesOf(side.moves)}.`
  const zones = side.zones.length === 0 ? '' : ` Zones ${side.zones.map(zone => `${zone.zone} from ${figure(zone.from)} to ${figure(zone.to)}`).join(', ')}.`
  return `${limitsOf(side)}. ${moves} ${stepsOf(side, unit)}${zones}`.trim()
}

/** What the rail shows, in one paragraph; it is the picture's text equivalent. */
export function railSentence(input: RailInput): string {
  const unit = railUnit(input)
  const place = (at: number) => figure(Number(at.toFixed(2)))
  const reach = input.stops
    ? `Rail between hard stops at ${place(input.stops.low)} and ${place(input.stops.high)} ${unit}`
    : `Rail ${input.wraps ? 'of one turn' : 'drawn'} from ${place(input.low)} to ${place(input.high)} ${unit}`
  if (!input.lower) return `${reach}, ${sideSentence(input.upper, unit)}`
  return `${reach}. Above, ${input.upper.name}: ${sideSentence(input.upper, unit)} Below, ${input.lower.name}: ${sideSentence(input.lower, unit)}`
}
