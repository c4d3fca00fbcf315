export type DecimalSign = 'point' | 'comma'

/*
 * 1.500 in a semicolon file may be one and a half or fifteen hundred. It is told from the other cells of the file, or asked;
 * never guessed. A minus sign does not count: -1.500 is as unclear as 1.500.
 */

const looksNumeric = /^[-+]?[\d.,]+(?:[eE][-+]?\d+)?$/
const groupedByPoint = /^[1-9]\d{0,2}(?:\.\d{3})+$/
const groupedByComma = /^[1-9]\d{0,2}(?:,\d{3})+$/

/** What the numeric cells of a file say about its decimal sign; 'mixed' where they contradict each other. */
export type Survey = DecimalSign | 'mixed' | 'unsaid'

/** Which cell is proof of a sign: it has the sign, and in a place where it cannot part thousands. */
export function proves(cell: string): { readonly point: boolean, readonly comma: boolean } {
  if (!looksNumeric.test(cell)) return { point: false, comma: false }
  const size = cell.replace(/^[-+]/, '')
  return { point: size.includes('.') && !groupedByPoint.test(size), comma: size.includes(',') && !groupedByComma.test(size) }
}

/** The survey over all numeric cells of a semicolon or tab file. */
export function surveyDecimals(cells: readonly string[]): Survey {
  const proofs = cells.map(proves)
  const point = proofs.some(each => each.point)
  const comma = proofs.some(each => each.comma)
  if (point && comma) return 'mixed'
  return point ? 'point' : comma ? 'comma' : 'unsaid'
}

/** The cell with its decimal sign made a point, or undefined where the sign of the file leaves it unclear. */
export function withPoint(cell: string, sign: DecimalSign | undefined): string | undefined {
  if (sign === 'comma') return cell.includes('.') ? undefined : cell.replaceAll(',', '.')
  return cell.includes(',') || (sign === undefined && cell.includes('.')) ? undefined : cell
}

/** Both readings of an unclear cell: its last sign as the decimal sign, and all signs as separators of thousands. */
export function bothReadings(cell: string): readonly [string, string] {
  const last = Math.max(cell.lastIndexOf('.'), cell.lastIndexOf(','))
  const digits = (part: string) => part.replace(/[.,]/g, '')
  return [`${digits(cell.slice(0, last))}.${cell.slice(last + 1)}`, digits(cell)]
}
