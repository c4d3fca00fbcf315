import { usedRows } from '../motion/chains'
import { onceFor } from '../motion/once'
import type { Content } from '../settings/types'
import { answers } from './answers'
import { axisUnits, plain, quantity } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { warn, unknown } = answers('window-grid')

interface Window { readonly at: string, readonly window: number, readonly move?: number }

export const windowGrid: Rule = {
  id: 'window-grid',
  title: 'In-position windows',
  reason: 'In a window finer than the unit can stand still in, the axis counts as arrived by luck, and the controller waits.',
  formula: 'window >= 2 · resolution; window >= repeatability; press moves exempt',
  levels: ['warn', 'unknown'],
  applies: ({ content }) => windows(content).length > 0,
  judge,
}

function judge({ content, nameplate }: JudgeInput): CheckResult[] {
  const { length } = axisUnits(content.axisKind)
  const { resolution, repeatability } = nameplate ?? {}
  const given = windows(content)
  const results = given.flatMap(({ at, window, move }) => {
    const say = (text: string, values: Record<string, number>) => warn([at],
      `${move === undefined ? 'The in-position window' : `Move ${move}: a window`} of ±${quantity(window, length)} is ${text}.`,
      { ...move === undefined ? {} : { move }, window, ...values })
    if (resolution !== undefined && window < 2 * resolution) {
      return [say(`less than two counts of ${quantity(resolution, length)}, ±${plain(2 * resolution)} ${length}`, { least: 2 * resolution, resolution })]
    }
    if (repeatability !== undefined && window < repeatability) {
      return [say(`finer than the ±${quantity(repeatability, length)} to which the unit repeats`, { least: repeatability, repeatability })]
    }
    return []
  })
  const missing = (['resolution', 'repeatability'] as const).filter(name => nameplate?.[name] === undefined).map(name => `nameplate.${name}`)
  return missing.length === 0 ? results : [...results, unknown('How fine the windows are', missing, given.map(({ at }) => at))]
}

/** The setup's window and those that moves have of their own; a press ends by force, wherever that is. */
const windows = onceFor(({ setup: { inPositionWindow }, moves }: Content): readonly Window[] => {
  const given: Window[] = inPositionWindow === undefined ? [] : [{ at: atSetup('inPositionWindow'), window: inPositionWindow }]
  for (const row of usedRows(moves)) {
    const { move, kind, window } = row.move
    if (window !== undefined && kind !== 'press') given.push({ at: atMove(row, 'window'), window, move })
  }
  return given
})
