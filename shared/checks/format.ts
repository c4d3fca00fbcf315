import { setupField } from '../settings/fields'
import { moveFields, zoneFields, type RowField } from '../settings/move-fields'
import type { AxisKind } from '../settings/types'
import { Exact } from '../units/exact'

/*
 * Words of the sentences in check results. Settings values and their exact differences print as they are: their shortest
 * decimals. Only what was computed through squares and roots is cut to what a person reads.
 */

/** The shortest decimals that read back as the same number, with a real minus sign. */
export function plain(value: number): string {
  return String(value + 0).replaceAll('-', '−')
}

/**
 * Four significant digits, or as many more as it takes to tell the value from `against`: "0.15 is above 0.15" would help
 * nobody.
 */
export function about(value: number, against?: number): string {
  for (let digits = 4; digits < 17; digits++) {
    const cut = significant(value, digits)
    if (against === undefined || cut !== significant(against, digits)) return plain(cut)
  }
  return plain(value)
}

function significant(value: number, digits: number): number {
  // Most bounds are short, and exact arithmetic takes a hundred times as long as to see it.
  if (String(value).length <= digits) return value
  return new Exact(value).toSignificantDigits(digits).toNumber()
}

/** Number and unit with one space, "38 %" as well; a bare number where the unit is ''. */
export function quantity(value: number, unit: string): string {
  return unit === '' ? plain(value) : `${plain(value)} ${unit}`
}

/** A value with its unit, a text in quotes, a switch as on or off. */
export function anyValue(value: number | string | boolean, unit: string): string {
  if (typeof value === 'number') return quantity(value, unit)
  return typeof value === 'string' ? `“${value}”` : value ? 'on' : 'off'
}

/** Canonical units of position, speed and acceleration on an axis. */
export function axisUnits(kind: AxisKind): { readonly length: string, readonly speed: string, readonly acceleration: string } {
  return kind === 'linear'
    ? { length: 'mm', speed: 'mm/s', acceleration: 'mm/s²' }
    : { length: 'deg', speed: 'deg/s', acceleration: 'deg/s²' }
}

/** "a", "a and b", "a, b and c"; '' for none. */
export function inWords(items: readonly string[]): string {
  return items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items[items.length - 1]}`
}

/** "move 5", "moves 5 and 7", "moves 5 to 9 and 12": three neighbours or more make a run. */
export function movesInWords(moves: readonly number[]): string {
  return `${moves.length === 1 ? 'move' : 'moves'} ${numbersInWords(moves)}`
}

/** "5", "5 and 7", "5 to 9 and 12", ascending. */
export function numbersInWords(numbers: readonly number[]): string {
  const runs: { first: number, last: number }[] = []
  for (const number of [...numbers].sort((a, b) => a - b)) {
    const run = runs.at(-1)
    if (run && number === run.last + 1) run.last = number
    else runs.push({ first: number, last: number })
  }
  return inWords(runs.flatMap(({ first, last }) => {
    if (last - first > 1) return [`${first} to ${last}`]
    return first === last ? [`${first}`] : [`${first}`, `${last}`]
  }))
}

/** The first letter in upper case: "move 5" begins a sentence as "Move 5". */
export function sentence(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** A field's words and unit by the name that site rules use (`thrustLimit`, `move.speed`, `zone.from`); undefined for no field. */
export function fieldWords(name: string, kind: AxisKind): { readonly label: string, readonly unit: string } | undefined {
  const [section, rowField] = name.split('.')
  if (rowField === undefined) {
    const field = setupField(name)
    return field && { label: field.label, unit: field.type === 'number' ? field.unit[kind] ?? '' : '' }
  }
  const table: Readonly<Record<string, RowField>> = section === 'move' ? moveFields : section === 'zone' ? zoneFields : {}
  const field = Object.hasOwn(table, rowField) ? table[rowField] : undefined
  return field && { label: field.label, unit: field.unit?.[kind] ?? '' }
}
