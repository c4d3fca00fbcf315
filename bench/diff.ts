import microdiff from 'microdiff'
import { diffContents } from '../shared/diff/diff'
import { diffRenumbered } from '../shared/diff/renumber'
import type { Content, Move, Setup } from '../shared/settings/types'
import { atMost, ratioOf, type Figure } from './figure'

/*
 * What a difference costs, as a ratio to microdiff over the same two contents. microdiff pairs rows by index and knows no
 * field. On an inserted row both it and the flat reading report every value behind it, a record each, and time goes into
 * making records; the renumbered reading says it in a run and a row.
 */

const setup: Setup = {
  positiveDirection: 'extend', softLimitsActive: true, softLimitMin: -2, softLimitMax: 198, homeOffset: 3.5, homingMethod: 'hard-stop',
  homingDirection: 'negative', homingSpeed: 20, homingCreepSpeed: 5, homingAcceleration: 500, homingForceLimit: 30, speedLimit: 600,
  accelerationLimit: 5000, decelerationLimit: 5000, quickStopDeceleration: 8000, jogSpeed: 30, pressSpeed: 8, smoothingTime: 4,
  inPositionWindow: 0.05, inPositionTime: 10, followingErrorWindow: 2, followingErrorTime: 50, thrustLimit: 80, overloadLevel: 120,
  overloadTime: 500, payloadMass: 4.2, mountingAngle: 90, frictionForce: 11, positionGain: 40, velocityGain: 2.375, velocityIntegralTime: 12,
  velocityFeedForward: 60, inertiaRatio: 310, notchFrequency: 420, inputSwitching: 'p', outputSwitching: 'p', selectInputs: 6,
  selectSettleTime: 8, startPulseTime: 12, onEnableLoss: 'stop-and-hold', brakeFitted: true, nodeAddress: 14,
}

function contentOf(rows: number): Content {
  const moves = Array.from({ length: rows }, (_, move): Move => {
    const common = { move, label: `Station ${move % 12}`, target: (move * 37 % 1950) / 10, speed: 100 + move * 7 % 400, acceleration: 2000 + move % 5 * 250 }
    if (move % 4 !== 3) return { ...common, kind: 'absolute', window: 0.1 }
    return { ...common, kind: 'press', forceLimit: 30 + move % 40, approach: common.target - 2, deceleration: 2500 }
  })
  return { axisKind: 'linear', extra: { 'K-017': 15, 'Filter': 'B' }, moves, setup, zones: [{ zone: 1, from: 10, to: 25 }] }
}

/** Another speed in `count` rows that lie evenly in the table. */
function edited(content: Content, count: number): Content {
  const chosen = new Set(Array.from({ length: count }, (_, k) => Math.floor((k + 0.5) * content.moves.length / count)))
  return { ...content, moves: content.moves.map((move, index) => chosen.has(index) ? { ...move, speed: move.speed + 5 } : move) }
}

/** A row that comes in after the first third; the rest moves on by one. */
function inserted(content: Content): Content {
  const at = Math.floor(content.moves.length / 3)
  const row: Move = { move: at, label: 'New', kind: 'absolute', target: 77.25, speed: 333, acceleration: 1234 }
  return { ...content, moves: [...content.moves.slice(0, at), row, ...content.moves.slice(at).map(move => ({ ...move, move: move.move + 1 }))] }
}

/** Both as they come out of the database, no object shared. */
function stored(content: Content): Content {
  return JSON.parse(JSON.stringify(content)) as Content
}

const cases: readonly (readonly [name: string, change: (content: Content) => Content])[] = [
  ['1 change', content => edited(content, 1)],
  ['5 changes', content => edited(content, 5)],
  ['a row inserted', inserted],
]

/** Ratios to microdiff for 16, 64 and 256 moves, and what is said of one inserted row. */
export async function measureDiff(): Promise<Figure[]> {
  const figures: Figure[] = []
  for (const rows of [16, 64, 256]) {
    const before = stored(contentOf(rows))
    const repeats = Math.ceil(16000 / rows)
    for (const [name, change] of cases) {
      const after = stored(change(before))
      const toMicrodiff = (work: (before: Content, after: Content) => unknown) =>
        ratioOf(() => work(before, after), () => microdiff(before as object as unknown[], after as object as unknown[]), 15, repeats)
      figures.push(atMost(`flat difference, ${rows} moves, ${name}`, toMicrodiff(diffContents), change === inserted ? 1 : 0.15))
      if (rows === 256) figures.push(atMost(`renumbered difference, ${rows} moves, ${name}`, toMicrodiff(diffRenumbered), 2))
    }
    figures.push(atMost(`said of a row inserted among ${rows}`, saidOf(before, stored(inserted(before))), 2, 'runs and rows'))
  }
  return figures
}

/** Runs, rows that come or go, and edits of rows that stay, in the renumbered reading; Infinity where there is none. */
function saidOf(before: Content, after: Content): number {
  const reading = diffRenumbered(before, after)
  if (!reading) return Infinity
  const alone = new Set(reading.pairs.filter(pair => pair.before === undefined || pair.after === undefined).map(pair => pair.after ?? pair.before))
  return reading.renumbered.length + alone.size + reading.changes.filter(change => !alone.has(change.row)).length
}
