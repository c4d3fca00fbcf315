import type { Row } from '../motion/chains'
import { limitPercent } from '../motion/limit'
import { atMove, atSetup } from './pointers'
import type { JudgeInput } from './types'

/** The limit that a thrust of one sign meets first. */
export interface BindingLimit {
  /** % of the force base; Infinity where nothing limits it. */
  readonly percent: number
  /** Where it stands; none where it is what the unit can do. */
  readonly at: readonly string[]
}

/** The lowest limit towards plus (1) or minus (-1), with that of a row where one is given and the row is no press. */
export function bindingLimit({ content: { setup }, nameplate }: JudgeInput, sign: 1 | -1, row?: Row): BindingLimit {
  // The limit of a press holds from its approach on, not on the way there.
  const own = row === undefined || row.move.kind === 'press' ? undefined : row.move.forceLimit
  const percent = limitPercent(sign, setup, nameplate, own)
  if (row !== undefined && own === percent) return { percent, at: [atMove(row, 'forceLimit')] }
  const field = (['thrustLimit', sign === 1 ? 'thrustLimitPositive' : 'thrustLimitNegative'] as const).find(name => setup[name] === percent)
  return { percent, at: field === undefined ? [] : [atSetup(field)] }
}
