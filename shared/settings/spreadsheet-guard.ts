import { isNumberText } from '../units/number'

/*
 * A spreadsheet takes a cell that begins with one of these for a formula (OWASP, "CSV Injection"). Such a text is written
 * with one apostrophe before it; numbers are not, so that a program reads -12.5 as it stands.
 */
const formula = /^'*[=+\-@\t\r\n＝＋－＠]/

function needsGuard(text: string): boolean {
  return formula.test(text) && !isNumberText(text)
}

/** The text as a cell; `unguard` is its inverse for every text. */
export function guard(text: string): string {
  return needsGuard(text) ? `'${text}` : text
}

/** Takes one apostrophe off exactly where the rest needs it; the inverse of `guard`. */
export function unguard(cell: string): string {
  return cell.startsWith('\'') && needsGuard(cell.slice(1)) ? cell.slice(1) : cell
}
