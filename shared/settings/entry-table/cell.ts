import type { ExtraValue } from '../types'
import { flagOf } from '../read-value'
import { textMark } from '../read-extra'
import { guard, unguard } from '../spreadsheet-guard'
import { withPoint } from '../csv-decimal'
import { spellUnit } from '../../units/units'
import { formatNumber, isNumberText } from '../../units/number'
import { type ValueKind, wordsOf } from './address'
import { fromDrive, toDrive } from './drive-number'
import type { EntryTable, EntryValue } from './schema'

/** A value in the neutral form's own terms: what its CSV would have in the cells value and unit. */
export interface NeutralCell { readonly text: string, readonly unit: string }
export type CellFault = { readonly code: 'number-unclear' | 'enum' | 'unit-unfit', readonly message: string, readonly meant?: string }
type Sign = EntryTable['decimal']

/** What a cell of the drive's list means, undefined where it says that nothing is set, or what is wrong with it. */
export function readDriveCell(sent: string, beside: string, entry: EntryValue, kind: ValueKind, sign: Sign): NeutralCell | CellFault | undefined {
  const trimmed = sent.trim()
  if (trimmed === '' || trimmed === entry.none) return undefined
  switch (kind.type) {
    case 'text': return { text: unguard(sent), unit: '' }
    case 'choice':
    case 'flag': return word(trimmed, entry, kind)
    case 'extra': return extra(sent, beside.trim(), entry, sign)
    case 'own': return number(trimmed, entry, '', sign)
    case 'number': return strangeUnit(beside.trim(), entry.unit ?? kind.unit) ?? number(trimmed, entry, entry.unit ?? '', sign)
  }
}

function word(sent: string, { words = {} }: EntryValue, kind: ValueKind): NeutralCell | CellFault {
  const known = wordsOf(kind)
  const found = known.find(each => (words[each] ?? each) === sent)
  if (found !== undefined) return { text: found, unit: '' }
  return { code: 'enum', message: `"${sent}" is none of ${known.map(each => words[each] === undefined ? each : `${words[each]} (${each})`).join(', ')}.` }
}

function number(sent: string, { factor }: EntryValue, unit: string, sign: Sign): NeutralCell | CellFault {
  const text = withPoint(sent, sign)
  if (text === undefined) return { code: 'number-unclear', message: `"${sent}" has another decimal sign than this list, which has the ${sign}.` }
  return { text: fromDrive(text, factor), unit }
}

function strangeUnit(beside: string, unit: string): CellFault | undefined {
  if (beside === '' || spellUnit(beside) === spellUnit(unit)) return undefined
  return { code: 'unit-unfit', message: `The file has ${beside} here, the entry table ${unit}. Correct the one that is wrong.`, meant: unit }
}

/** A value of the drive's own: a number where it reads as one, true or false, else text; with the unit of its entry, or the one beside it. */
function extra(sent: string, beside: string, { unit = beside }: EntryValue, sign: Sign): NeutralCell {
  const text = withPoint(sent, sign)
  const isNumber = text !== undefined && isNumberText(text)
  if (isNumber) return { text, unit }
  return { text: unguard(sent), unit: flagOf(sent) === undefined ? textMark : '' }
}

/** The cell that the drive's list has for a value; `readDriveCell` of it is the value, save for what the entry's rounding takes. */
export function writeDriveCell(value: ExtraValue | undefined, entry: EntryValue, kind: ValueKind, sign: Sign): string {
  if (value === undefined) return entry.none ?? ''
  if (typeof value === 'object') return signed(formatNumber(value.value), sign)
  if (typeof value === 'number') return signed(kind.type === 'number' ? toDrive(value, entry, kind.unit) : formatNumber(value), sign)
  if (kind.type === 'choice' || kind.type === 'flag') return entry.words?.[String(value)] ?? String(value)
  return typeof value === 'boolean' ? String(value) : guard(value)
}

const signed = (text: string, sign: Sign) => sign === 'comma' ? text.replace('.', ',') : text
