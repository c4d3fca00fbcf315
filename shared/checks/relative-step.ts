import { endlessChains, knownStarts, turned, usedRows, type Row } from '../motion/chains'
import { minus } from '../motion/exact'
import { lapThatLeaves, lapTravel } from '../motion/lap'
import { answers } from './answers'
import { axisUnits, movesInWords, quantity, sentence } from './format'
import { softLimits, turnsFreely } from './limits'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, note, unknown } = answers('relative-step')

export const relativeStep: Rule = {
  id: 'relative-step',
  title: 'Relative steps',
  reason: 'A relative move goes on from wherever the axis stands: called once too often it leaves the travel.',
  formula: 'n = floor((softLimitMax − softLimitMin) / |distance| + 1e-9) repeats from the far end: 0 stop, 1 warn, else note; an endless chain of relative moves with net travel: stop',
  levels: ['stop', 'warn', 'note', 'unknown'],
  applies: ({ content }) => !turnsFreely(content) && steps(usedRows(content.moves)).length > 0,
  judge,
}

function judge({ content }: JudgeInput): CheckResult[] {
  const { length } = axisUnits(content.axisKind)
  const { min, max, missing } = softLimits(content)
  const rows = usedRows(content.moves)
  const results = runaways(rows, length, min, max)
  if (min === undefined || max === undefined) {
    return [...results, unknown('How often a relative step fits', missing, steps(rows).map(row => atMove(row, 'target')))]
  }
  const span = minus(max, min)
  for (const row of steps(rows)) {
    const { move, target } = row.move
    const fits = Math.max(0, Math.floor(span / Math.abs(target) + 1e-9))
    const room = `the ${quantity(span, length)} between the soft limits`
    const text = fits === 0 ? `is longer than ${room}` : fits === 1 ? `fits only once into ${room}` : `fits ${fits} times into ${room}`
    const say = fits === 0 ? stop : fits === 1 ? warn : note
    results.push(say([atMove(row, 'target')], `Move ${move}, a step of ${quantity(target, length)}, ${text}.`, { move, step: target, span, fits }))
  }
  return results
}

/** A step of 0 goes nowhere, however often it is called. */
function steps(rows: readonly Row[]): Row[] {
  return rows.filter(({ move }) => move.kind === 'relative' && move.target !== 0)
}

function runaways(rows: readonly Row[], length: string, min?: number, max?: number): CheckResult[] {
  const starts = knownStarts(rows)
  const results: CheckResult[] = []
  for (const loop of endlessChains(rows)) {
    // Laps are counted from where the chain is known to be entered, else from its lowest number.
    const chain = turned(loop, Math.max(0, loop.findIndex(row => (starts.get(row.move.move)?.positions.length ?? 0) > 0)))
    const lap = lapTravel(chain.map(row => row.move))
    if (!lap || lap.net === 0) continue
    const moves = loop.map(row => row.move.move)
    const at = loop.flatMap(row => [atMove(row, 'target'), atMove(row, 'next')])
    const story = `${sentence(movesInWords(moves))} ${moves.length === 1 ? 'repeats' : 'repeat'} without end, ${quantity(lap.net, length)} further each lap`
    if (min === undefined || max === undefined) {
      results.push(stop(at, `${story}: sooner or later the axis leaves its travel.`, { moves, net: lap.net }))
      continue
    }
    const positions = chain.slice(0, 1).flatMap(row => starts.get(row.move.move)?.positions ?? [])
    const laps = positions.length > 0 ? positions.map(start => lapThatLeaves(lap, min, max, start)) : [lapThatLeaves(lap, min, max)]
    const leaves = Math.min(...laps)
    const when = positions.length > 0 ? `lap ${leaves}` : `lap ${leaves} at the latest`
    results.push(stop([...at, atSetup('softLimitMin'), atSetup('softLimitMax')], `${story}: ${when} leaves the soft limits.`,
      { moves, net: lap.net, lap: leaves, span: minus(max, min) }))
  }
  return results
}
