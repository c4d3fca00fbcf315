import { usedRows, type Row } from '../motion/chains'
import { isAbove, minus } from '../motion/exact'
import { endsByHardStop } from '../motion/hard-stops'
import { answers } from './answers'
import { drivenRows } from './driven'
import { about, axisUnits, quantity } from './format'
import { softLimits } from './limits'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, note, unknown } = answers('following-window')
const at = atSetup('followingErrorWindow')

export const followingWindow: Rule = {
  id: 'following-window',
  title: 'Following error window',
  reason: 'A window narrower than the axis lags stops the machine for nothing; one wider than the room to the hard stop tells too late.',
  formula: 'followingErrorWindow > inPositionWindow and > v/positionGain · (1 − velocityFeedForward/100) at the highest speed of a move; larger than the room from soft limit to hard stop: note',
  levels: ['warn', 'note', 'unknown'],
  applies: ({ content }) => usedRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { followingErrorWindow: window, inPositionWindow, positionGain } = input.content.setup
  if (window === undefined) return [unknown('The following error window', ['followingErrorWindow'], [at])]
  const { length } = axisUnits(input.content.axisKind)
  const words = `The following error window of ±${quantity(window, length)}`
  const missing: string[] = []
  const results: CheckResult[] = []
  if (inPositionWindow === undefined) missing.push('inPositionWindow')
  else if (window <= inPositionWindow) {
    results.push(warn([at, atSetup('inPositionWindow')], `${words} is not wider than the in-position window of ±${quantity(inPositionWindow, length)}.`, { window, inPosition: inPositionWindow }))
  }
  if (positionGain === undefined || positionGain === 0) missing.push('positionGain')
  else results.push(...lagging(input, window, words, positionGain))
  results.push(...roomy(input, window, words, length))
  return missing.length === 0 ? results : [...results, unknown('The following error window', missing, [at])]
}

function lagging(input: JudgeInput, window: number, words: string, gain: number): CheckResult[] {
  const units = axisUnits(input.content.axisKind)
  const { row, speed } = fastest(input)
  const lag = Math.max(0, speed / gain * (1 - (input.content.setup.velocityFeedForward ?? 0) / 100))
  if (!row || isAbove(window, lag)) return []
  const { move } = row.move
  return [warn([at, atMove(row, 'speed'), atSetup('positionGain')],
    `${words} is not wider than the ${about(lag)} ${units.length} that the axis lags in move ${move} at ${about(speed)} ${units.speed}: the drive stops it.`,
    { window, lag, speed, move })]
}

/** The row that gets the highest speed; of several alike the one with the lowest number. */
function fastest(input: JudgeInput): { readonly row?: Row, readonly speed: number } {
  let most: { row?: Row, speed: number } = { speed: 0 }
  for (const { row, ways } of drivenRows(input)) {
    const speed = Math.max(0, ...ways.map(({ profile }) => profile.peakSpeed))
    if (speed > most.speed || (speed === most.speed && most.row && row.move.move < most.row.move.move)) most = { row, speed }
  }
  return most
}

/** The smaller room between a soft limit and its hard stop, where the homing tells the hard stops. */
function roomy({ content, nameplate }: JudgeInput, window: number, words: string, length: string): CheckResult[] {
  const ends = content.setup.homingMethod === 'hard-stop' && content.setup.modulo === undefined ? endsByHardStop(content.setup, nameplate) : undefined
  const { min, max } = softLimits(content)
  const rooms = ends ? [...min === undefined ? [] : [minus(min, ends.hardLow)], ...max === undefined ? [] : [minus(ends.hardHigh, max)]] : []
  const room = Math.min(...rooms)
  // Limits beyond the stop are another rule's to tell.
  if (rooms.length === 0 || room < 0 || window <= room) return []
  return [note([at], `${words} is wider than the ${quantity(room, length)} from soft limit to hard stop: the axis is there before the drive notices.`, { window, room })]
}
