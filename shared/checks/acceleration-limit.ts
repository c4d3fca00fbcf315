import { usedRows } from '../motion/chains'
import type { Content } from '../settings/types'
import { answers } from './answers'
import { aboveNameplate, aboveSetup, type Asked } from './ceiling'
import { axisUnits } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const say = answers('acceleration-limit')

// The quick stop is not among them: it has to be harder than any move.
const setupAccelerations = {
  homingAcceleration: 'The homing acceleration', accelerationLimit: 'The acceleration limit', decelerationLimit: 'The deceleration limit',
} as const

export const accelerationLimit: Rule = {
  id: 'acceleration-limit',
  title: 'Accelerations',
  reason: 'An acceleration beyond the unit ends in lag and errors; one beyond the setup is clipped, and the cycle takes longer than it says.',
  formula: 'accelerations and decelerations of moves and homing, and the setup’s own limits, <= maxAcceleration; of moves <= accelerationLimit, decelerationLimit',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content }) => usedRows(content.moves).length > 0 || inSetup(content, -Infinity).length > 0,
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { acceleration } = axisUnits(content.axisKind)
  const up = (limit: number) => speedingUp(content, limit)
  const down = (limit: number) => slowingDown(content, limit)
  const ownDown = (limit: number) => down(limit).filter(({ at }) => at.endsWith('/deceleration'))
  return [
    ...aboveNameplate(say, 'Accelerations', limit => [...up(limit), ...ownDown(limit), ...inSetup(content, limit)], acceleration, 'maxAcceleration', nameplate?.maxAcceleration),
    ...aboveSetup(say, up, acceleration, atSetup('accelerationLimit'), content.setup.accelerationLimit),
    ...aboveSetup(say, down, acceleration, atSetup('decelerationLimit'), content.setup.decelerationLimit),
  ]
}

function speedingUp({ moves }: Content, limit: number): Asked[] {
  return usedRows(moves).filter(({ move }) => move.acceleration > limit).map(row => ({
    at: atMove(row, 'acceleration'), words: `Move ${row.move.move}: an acceleration`, value: row.move.acceleration, move: row.move.move,
  }))
}

/** Without a deceleration of its own a move brakes as it accelerates. */
function slowingDown({ moves }: Content, limit: number): Asked[] {
  return usedRows(moves).filter(({ move }) => (move.deceleration ?? move.acceleration) > limit).map((row) => {
    const { move, acceleration, deceleration } = row.move
    return {
      at: atMove(row, deceleration === undefined ? 'acceleration' : 'deceleration'),
      words: `Move ${move}: a deceleration`, value: deceleration ?? acceleration, move,
    }
  })
}

function inSetup({ setup }: Content, limit: number): Asked[] {
  return (Object.keys(setupAccelerations) as (keyof typeof setupAccelerations)[]).flatMap((field) => {
    const value = setup[field]
    return value === undefined || value <= limit ? [] : [{ at: atSetup(field), words: setupAccelerations[field], value }]
  })
}
