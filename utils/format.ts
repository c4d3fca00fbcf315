import { differenceInCalendarDays } from 'date-fns'
import { partsOfTime, shortMonth } from '#shared/units/exact-time'
import { formatNumber } from '#shared/units/number'
import type { ExtraValue } from '#shared/settings/types'

export { formatExact, zoneWord } from '#shared/units/exact-time'

/** A count with a thin gap between thousands: 48 211. */
export function formatCount(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+(?!\d))/g, ' ')
}

/** '1 axis', '3 axes': the word in the number that the count wants. */
export function counted(count: number, one: string, many: string): string {
  return `${formatCount(count)} ${count === 1 ? one : many}`
}

/** How many digits stand after the point of the longest of these numbers: the width of the column's fraction. */
export function fractionOf(values: Iterable<unknown>): number {
  let longest = 0
  for (const value of values) {
    if (typeof value !== 'number') continue
    longest = Math.max(longest, (formatNumber(value).split('.')[1] ?? '').length)
  }
  return longest
}

export interface ShownValue { readonly whole: string, readonly fraction: string, readonly unit: string, readonly numeric: boolean }

/** A value as it stands on a screen: cut at the point, its unit apart. Absent values are a dash. */
export function showValue(value: ExtraValue | null | undefined, unit = ''): ShownValue {
  if (value === null || value === undefined) return { whole: '–', fraction: '', unit: '', numeric: false }
  if (typeof value === 'object') return showValue(value.value, value.unit)
  if (typeof value === 'boolean') return { whole: value ? 'on' : 'off', fraction: '', unit: '', numeric: false }
  if (typeof value === 'string') return { whole: value, fraction: '', unit, numeric: false }
  const [whole = '', fraction] = formatNumber(value).split('.')
  return { whole: whole.replace('-', '−'), fraction: fraction === undefined ? '' : `.${fraction}`, unit, numeric: true }
}

/** The same value as one line of words, for labels and titles. */
export function sayValue(value: ExtraValue | null | undefined, unit = ''): string {
  const shown = showValue(value, unit)
  return [shown.whole + shown.fraction, shown.unit].filter(Boolean).join(' ')
}

/** 1 Dec 07:42; with its year once that is not the year of `now`. The zone is named by the column's head. */
export function formatShort(iso: string, timeZone: string, now: Date): string {
  const p = partsOfTime(new Date(iso), timeZone)
  const year = p.year === partsOfTime(now, timeZone).year ? '' : ` ${p.year}`
  return `${p.day} ${shortMonth(p.month)}${year} ${p.hour}:${p.minute}`
}

/** 19 Nov, with its year once that is not the year of `now`. */
export function formatDay(iso: string, timeZone: string, now: Date): string {
  return formatShort(iso, timeZone, now).replace(/ \d\d:\d\d$/, '')
}

const minute = 60_000

/** '5 min', '3 h', '1 d 1 h', '239 d': a length of time in the two largest terms that still matter. */
export function formatSpan(milliseconds: number): string {
  const minutes = Math.floor(Math.max(0, milliseconds) / minute)
  if (minutes < 60) return `${minutes} min`
  const hours = Math.floor(minutes / 60)
  if (hours < 24) return `${hours} h`
  const days = Math.floor(hours / 24)
  return days < 3 && hours % 24 > 0 ? `${days} d ${hours % 24} h` : `${days} d`
}

/** 'just now', '3 h ago'. */
export function formatAgo(iso: string, now: Date): string {
  const passed = now.getTime() - new Date(iso).getTime()
  return passed < minute ? 'just now' : `${formatSpan(passed)} ago`
}

/** Whole days by the calendar between then and now. */
export function daysSince(iso: string, now: Date): number {
  return differenceInCalendarDays(now, new Date(iso))
}
