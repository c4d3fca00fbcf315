import { setupField } from './fields'
import { moveFields, zoneFieldNames } from './move-fields'
import { type DecimalSign, bothReadings, surveyDecimals, proves, withPoint } from './csv-decimal'
import type { Delimiter } from './csv-header'
import type { CellMaker, Entry } from './csv-tree'
import { type Problems, cutText } from './problems'
import type { CsvRecord } from './csv-records'
import { textMark } from './read-extra'
import { isNumberText } from '../units/number'

const numericMoves = new Set(Object.entries(moveFields).filter(([, field]) => field.type === 'number' || field.type === 'row').map(([name]) => name))
const numericZones = new Set<string>(zoneFieldNames)

/** Whether the cell is a number by its field; 'maybe' for a value of the drive's own without a unit. */
function isNumeric({ section, field, unit }: Omit<Entry, 'value'>): boolean | 'maybe' {
  switch (section) {
    case 'setup': return setupField(field)?.type === 'number'
    case 'move': return numericMoves.has(field)
    case 'zone': return numericZones.has(field)
    case 'extra':
    case 'reading': return unit === '' ? 'maybe' : unit !== textMark
    default: return false
  }
}

/** The decimal sign of a file: a point where commas part the cells, else what its numeric cells or the options say. */
export function decimalOf(
  delimiter: Delimiter, records: readonly CsvRecord[], asked: DecimalSign | undefined, problems: Problems,
): DecimalSign | 'mixed' | undefined {
  if (delimiter === ',') return 'point'
  const numeric = records.filter(({ cells: [section = '', , field = '', , unit = ''] }) => isNumeric({ section: section as Entry['section'], field, unit }) === true)
  const survey = surveyDecimals(numeric.map(record => record.cells[3] ?? ''))
  if (survey === 'unsaid') return asked
  if (survey !== 'mixed') return survey
  const first = (sign: 'point' | 'comma') => numeric.find(record => proves(record.cells[3] ?? '')[sign])
  const [point, comma] = [first('point'), first('comma')]
  problems.add('decimal-mixed', '', comma && { offset: comma.offset, end: comma.offset, cell: 3 },
    `The file has both "${cutText(point?.cells[3] ?? '')}" and "${cutText(comma?.cells[3] ?? '')}": write all numbers with one decimal sign.`, { value: comma?.cells[3] ?? '' })
  return 'mixed'
}

/** Makes cells with their decimal sign a point; a numeric cell that could be read two ways is refused with both readings named. */
export function cellMaker(delimiter: Delimiter, decimal: DecimalSign | 'mixed' | undefined, problems: Problems): CellMaker {
  return (entry, spot, at) => {
    const numeric = isNumeric(entry)
    const { value, unit } = entry
    const asItIs = { kind: 'cell' as const, ...spot, text: value, unit }
    if (numeric === false || !/[.,]/.test(value)) return asItIs
    if (numeric === 'maybe' && !couldBeNumber(value, delimiter)) return asItIs
    if (decimal === 'mixed') return { kind: 'refused', ...spot }
    const text = withPoint(value, decimal)
    if (text !== undefined) return { ...asItIs, text }
    const [one, other] = bothReadings(value)
    const advice = numeric === 'maybe'
      ? `, or text: write ${textMark} beside it if so`
      : decimal === undefined ? ': say which sign is the decimal one' : `: the decimal ${decimal} is the sign of this file`
    problems.addValue('number-unclear', at, spot, `"${cutText(value)}" could be ${cutText(one)} or ${cutText(other)}${advice}.`)
    return { kind: 'refused', ...spot }
  }
}

/** In a file with commas between the cells only the JSON grammar makes a number of such a cell; all else is text. */
function couldBeNumber(value: string, delimiter: Delimiter): boolean {
  if (delimiter === ',') return isNumberText(value)
  return isNumberText(value) || isNumberText(value.replace(',', '.'))
}
