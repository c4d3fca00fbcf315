import type { CheckResult } from '#shared/checks/types'
import type { FieldChange } from '#shared/diff/types'
import { weights, type ExtraValue, type Weight } from '#shared/settings/types'
import { sayValue } from '../format'
import { differenceWords } from './difference'
import { absentWord, changeWords, placeWords, valueWord } from './fields'
import { checksByLine, meansOf, rowSummary, type MeansContext } from './means'
import { changeLines, type ChangeLine } from './rows'

/** One line of what changed, ready to stand on the page. */
export interface ShownChange {
  readonly key: string
  readonly weight: Weight
  readonly label: string
  readonly place: string
  /** The value whose history can be asked for; null for a row that came or went. */
  readonly of: Pick<FieldChange, 'section' | 'field' | 'row'> | null
  readonly before: ExtraValue | undefined
  readonly after: ExtraValue | undefined
  readonly unit: string
  /** Figures stand in a column; words begin where their cell does. */
  readonly numeric: boolean
  readonly difference: string
  readonly means: string
  readonly checks: readonly CheckResult[]
}

const amount = (value: ExtraValue | undefined) => typeof value === 'object' ? value.value : value

function shownValue(change: FieldChange, value: ExtraValue | undefined): ExtraValue | undefined {
  return value === undefined ? absentWord(change) : valueWord(change.field, amount(value))
}

function shownField(line: ChangeLine, context: MeansContext): Omit<ShownChange, 'checks'> {
  const { change } = line
  const words = changeWords(change, context)
  const unit = words.unit && words.plusMinus ? `± ${words.unit}` : words.unit
  const values = [shownValue(change, change.before), shownValue(change, change.after)]
  const numeric = values.every(value => value === undefined || typeof value === 'number')
  const [before, after] = numeric ? values : values.map(value => typeof value === 'number' ? sayValue(value, unit) : value)
  return {
    key: line.key, weight: change.weight, label: words.label, place: placeWords(change), of: change, before, after, numeric, unit: numeric ? unit : '',
    difference: differenceWords(change), means: meansOf(change, context),
  }
}

function shownRow(line: ChangeLine, context: MeansContext): Omit<ShownChange, 'checks'> {
  const { change, row } = line
  const fields = row?.fields ?? []
  const isNew = row?.state === 'new'
  const values = Object.fromEntries(fields.map(field => [field.field, isNew ? field.after : field.before]))
  const what = change.section === 'zone' ? 'zone' : String(values.kind ?? 'move')
  const label = typeof values.label === 'string' ? `“${values.label}”. ` : ''
  const meaning = change.section === 'zone' ? 'The output is on in between.' : isNew ? 'Any call of this number now does this.' : 'Nothing answers to this number any more, or another move does.'
  return {
    key: line.key, weight: change.weight, label: `${change.section} ${change.row ?? ''} is ${isNew ? 'new' : 'gone'}`, place: rowSummary(values, context), of: null,
    before: isNew ? undefined : what, after: isNew ? what : undefined, unit: '', numeric: false,
    difference: isNew ? 'added' : 'removed', means: `${label}${meaning}`,
  }
}

/** Where a line stands in the second content; what is gone stands nowhere in it. */
function placesOf(line: ChangeLine): string[] {
  return (line.row?.fields ?? [line.change]).filter(change => change.after !== undefined).map(change => change.at)
}

/** What changed, by weight, heaviest first; a weight without a change is left out. */
export function changeTable(changes: readonly FieldChange[], context: MeansContext, checks: readonly CheckResult[], checksBefore: readonly CheckResult[]): { weight: Weight, lines: ShownChange[] }[] {
  const lines = changeLines(changes)
  const hits = checksByLine(lines.map(line => ({ key: line.key, ats: placesOf(line) })), checks, checksBefore)
  const shown = lines.map(line => ({ ...(line.row ? shownRow(line, context) : shownField(line, context)), checks: hits.get(line.key) ?? [] }))
  return weights.map(weight => ({ weight, lines: shown.filter(line => line.weight === weight) })).filter(group => group.lines.length > 0)
}
