import { Exact } from '../../units/exact'
import { findUnit } from '../../units/units'
import { formatNumber, isNumberText } from '../../units/number'
import type { EntryValue, Rounding } from './schema'

/** Where neither step nor digits are told: far below the sixth decimal of any canonical unit, so that reading gives the value back. */
const plentyOfDigits = 15

const modes: Readonly<Record<Rounding, Parameters<Exact['toDecimalPlaces']>[1]>> = {
  'half-even': Exact.ROUND_HALF_EVEN, 'down': Exact.ROUND_DOWN, 'up': Exact.ROUND_UP,
}

/**
 * The drive's number for a canonical value, with a decimal point: into the entry's unit, onto its step, by its factor, to its
 * digits. Inverse of `fromDrive` for values on the step; others lose what the entry's rounding takes.
 */
export function toDrive(value: number, entry: EntryValue, canonical: string): string {
  const inUnit = intoUnit(new Exact(formatNumber(value)), entry.unit, canonical)
  const mode = modes[entry.rounding ?? 'half-even']
  const stepped = entry.step === undefined ? inUnit : inUnit.div(entry.step).toDecimalPlaces(0, mode).times(entry.step)
  const number = stepped.div(entry.factor ?? 1)
  return padded(number.toDecimalPlaces(entry.digits ?? plentyOfDigits, entry.digits === undefined ? Exact.ROUND_HALF_EVEN : mode), entry.digits ?? 0)
}

function intoUnit(value: Exact, name: string | undefined, canonical: string): Exact {
  const unit = name === undefined ? undefined : findUnit(name, canonical)
  return unit === undefined || typeof unit === 'string' ? value : value.times(unit.over).div(unit.times)
}

function padded(number: Exact, digits: number): string {
  const [whole = '0', part = ''] = (number.isZero() ? new Exact(0) : number).toString().split('.')
  const fraction = part.padEnd(digits, '0')
  return fraction === '' ? whole : `${whole}.${fraction}`
}

/** The entry's multiple of what the drive wrote, still in the entry's unit, as decimal text; text that is no number comes back as it is. */
export function fromDrive(text: string, factor: number | undefined): string {
  const plain = plainNumberText(text)
  return factor === undefined || !isNumberText(plain) || plain.length > 40 ? plain : new Exact(plain).times(factor).toString()
}

/** Drives pad with zeros and write a plus: +007.50 becomes 7.50, .5 becomes 0.5. Anything else stays. */
function plainNumberText(text: string): string {
  const parts = /^([-+]?)0*(\d*)(\.\d+)?$/.exec(text)
  if (parts === null || !/\d/.test(text)) return text
  const [, sign, whole, fraction = ''] = parts
  return `${sign === '-' ? '-' : ''}${whole === '' ? '0' : whole}${fraction}`
}
