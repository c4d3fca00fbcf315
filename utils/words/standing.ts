import type { Axis, ChangesAnswer } from '#shared/api/versions'
import { countByWeight } from '#shared/diff/summary'

/** How one version stands to the known-good in force: the axis as its head would show it if the drive held that version. */
export function asIfToday(axis: Axis, compared: { readonly answer: ChangesAnswer } | null): Axis {
  const none = { harm: 0, motion: 0, text: 0 }
  if (!axis.knownGood) return { ...axis, status: 'unmarked', off: none, sense: null }
  if (!compared || compared.answer.compare !== 'differs') return { ...axis, status: 'in-line', off: none, sense: null }
  const heaviest = compared.answer.changes.find(change => change.delta !== undefined)
  const sense = heaviest?.delta === undefined ? null : heaviest.delta < 0 ? 'less' : 'more'
  return { ...axis, status: 'off', off: countByWeight(compared.answer.told?.changes ?? compared.answer.changes), sense }
}
