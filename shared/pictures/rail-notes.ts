import type { RailHalf } from './rail-half'
import type { RailInput, RailSide } from './rail-input'
import { figure } from './scale'

/** Numbers in rising order, those that follow one another as a run: '0–3, 7, 9'. */
export function runsOf(numbers: readonly number[]): string {
  const runs: number[][] = []
  for (const number of numbers.toSorted((a, b) => a - b)) {
    const last = runs.at(-1)
    if (last?.at(-1) === number - 1) last.push(number)
    else runs.push([number])
  }
  return runs.map(run => run.length < 3 ? run.join(', ') : `${run[0]}–${run.at(-1)}`).join(', ')
}

/** What the picture of a side could not place or had to fold, by number; mm or deg as `unit` says. */
export function railNotes({ steps }: Pick<RailSide, 'steps'>, half: Pick<RailHalf, 'folds' | 'crowds'> | undefined, unit: string): string[] {
  return [
    ...(half?.folds ?? []).map(fold => `${fold.moves.length} presses between ${figure(fold.from)} and ${figure(fold.to)} ${unit}: moves ${runsOf(fold.moves)}`),
    ...(half?.crowds ?? []).map(crowd => `${crowd.text} in one place: moves ${runsOf(crowd.moves)}`),
    ...steps.map(step => `move ${step.move} steps by ${figure(step.by)} ${unit}`),
  ]
}

/** Hard stops, soft limits and zones of a rail in words, one sentence each. */
export function railBounds({ upper, stops, wraps, low, high }: RailInput, unit: string): string[] {
  const { softMin, softMax, limitsHeld, zones } = upper
  const soft = [softMin === undefined ? '' : `min ${figure(softMin)}`, softMax === undefined ? '' : `max ${figure(softMax)}`].filter(Boolean)
  return [
    stops ? `Hard stops at ${figure(stops.low)} and ${figure(stops.high)} ${unit}.` : wraps ? `One turn, ${figure(low)} to ${figure(high)} ${unit}.` : 'Hard stops not known: they take the stroke of the model and homing against a stop.',
    soft.length === 0 ? 'No soft limits.' : `Soft limits ${soft.join(', ')} ${unit}${limitsHeld ? '' : ', not held'}.`,
    ...zones.map(({ zone, from, to }) => `Zone ${zone} from ${figure(from)} to ${figure(to)} ${unit}.`),
  ]
}
