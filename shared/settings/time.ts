import { CodedError } from '../errors/coded'

/*
 * RFC 3339 read by our own grammar: Date.parse takes 30 February for 2 March and refuses leap seconds.
 */

const timestamp = /^(\d{4})-(\d\d)-(\d\d)[Tt](\d\d):(\d\d):(\d\d)(?:\.(\d{1,20}))?(?:[Zz]|([-+])(\d\d):(\d\d))$/
const monthDays = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]
const minute = 60_000

function daysIn(year: number, month: number): number {
  const leap = year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0)
  return month === 2 && leap ? 29 : monthDays[month - 1] ?? 0
}

/** Epoch milliseconds of midnight UTC at the beginning of a day; year 0 to 9999. */
function dayStart(year: number, month: number, day: number): number {
  // Date.UTC takes the years 0 to 99 for 1900 to 1999; 400 Gregorian years are 146,097 days.
  return Date.UTC(year + 400, month - 1, day) - 146_097 * 86_400_000
}

/**
 * Epoch milliseconds of an RFC 3339 time with offset, digits beyond the millisecond cut; undefined where the text is none or
 * the day is not real. A leap second (:60) counts only as the last of a UTC month and reads as the second after it.
 */
export function parseTimestamp(text: string): number | undefined {
  const parts = timestamp.exec(text)
  if (!parts) return undefined
  const at = (index: number) => Number(parts[index] ?? 0)
  const [year, month, day, hours, minutes, seconds] = [at(1), at(2), at(3), at(4), at(5), at(6)]
  if (month < 1 || month > 12 || day < 1 || day > daysIn(year, month)) return undefined
  if (hours > 23 || minutes > 59 || seconds > 60 || at(9) > 23 || at(10) > 59) return undefined
  const offset = (parts[8] === '-' ? -1 : 1) * (at(9) * 60 + at(10)) * minute
  const toMinute = dayStart(year, month, day) + (hours * 60 + minutes) * minute - offset
  if (seconds === 60 && !endsUtcMonth(toMinute + minute)) return undefined
  return toMinute + seconds * 1000 + Number((parts[7] ?? '').slice(0, 3).padEnd(3, '0'))
}

function endsUtcMonth(instant: number): boolean {
  const next = new Date(instant)
  return instant % 86_400_000 === 0 && next.getUTCDate() === 1
}

/** `YYYY-MM-DDTHH:MM:SS.sssZ`; the inverse of parseTimestamp on whole milliseconds of the years 0 to 9999, else throws 'no-time'. */
export function formatTimestamp(epochMs: number): string {
  const text = Number.isFinite(epochMs) ? new Date(epochMs).toISOString() : ''
  if (text.length !== 24 || !Number.isInteger(epochMs)) throw new CodedError('no-time', `${epochMs} is no time of the years 0 to 9999.`, { epochMs })
  return text
}
