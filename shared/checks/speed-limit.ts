import { usedRows } from '../motion/chains'
import type { Content } from '../settings/types'
import { answers } from './answers'
import { aboveNameplate, aboveSetup, type Asked } from './ceiling'
import { axisUnits } from './format'
import { atMove, atSetup } from './pointers'
import { pressRows } from './presses'
import type { CheckResult, JudgeInput, Rule } from './types'

const say = answers('speed-limit')

const setupSpeeds = {
  homingSpeed: 'The homing speed', homingCreepSpeed: 'The homing creep speed', speedLimit: 'The speed limit',
  jogSpeed: 'The jog speed', pressSpeed: 'The press speed',
} as const

export const speedLimit: Rule = {
  id: 'speed-limit',
  title: 'Speeds',
  reason: 'A speed beyond the unit ends in an error or in wear; one beyond the setup is clipped, and the cycle takes longer than it says.',
  formula: 'speeds of moves, presses, homing and jog, and speedLimit, <= maxSpeed; speeds of moves and presses <= speedLimit',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content }) => usedRows(content.moves).length > 0 || inSetup(content, -Infinity).length > 0,
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { speed } = axisUnits(content.axisKind)
  return [
    ...aboveNameplate(say, 'Speeds', limit => [...inMoves(content, limit), ...inSetup(content, limit)], speed, 'maxSpeed', nameplate?.maxSpeed),
    ...aboveSetup(say, limit => [...inMoves(content, limit), ...pressesAtSetupSpeed(content, limit)], speed, atSetup('speedLimit'), content.setup.speedLimit),
  ]
}

function inMoves({ moves }: Content, limit: number): Asked[] {
  const asked: Asked[] = []
  for (const row of usedRows(moves)) {
    const { move, speed, pressSpeed } = row.move
    if (speed > limit) asked.push({ at: atMove(row, 'speed'), words: `Move ${move}: a speed`, value: speed, move })
    if (pressSpeed !== undefined && pressSpeed > limit) asked.push({ at: atMove(row, 'pressSpeed'), words: `Press ${move}: a press speed`, value: pressSpeed, move })
  }
  return asked
}

/** Presses without a press speed of their own: the setup's counts against the setup's limit, once for each such move. */
function pressesAtSetupSpeed({ moves, setup: { pressSpeed } }: Content, limit: number): Asked[] {
  if (pressSpeed === undefined || pressSpeed <= limit) return []
  return pressRows(moves).filter(({ move }) => move.pressSpeed === undefined)
    .map(({ move: { move } }) => ({ at: atSetup('pressSpeed'), words: `Press ${move}: a press speed`, value: pressSpeed, move }))
}

function inSetup({ setup }: Content, limit: number): Asked[] {
  return (Object.keys(setupSpeeds) as (keyof typeof setupSpeeds)[]).flatMap((field) => {
    const value = setup[field]
    return value === undefined || value <= limit ? [] : [{ at: atSetup(field), words: setupSpeeds[field], value }]
  })
}
