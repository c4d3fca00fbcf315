import { differenceInCalendarDays } from 'date-fns'
import { formatNumber } from '#shared/units/number'
import type { ExtraValue } from '#shared/settings/types'

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

/** Making a formatter costs more than a row of the board does, so each zone has one. */
const formatters = new Map<string, Intl.DateTimeFormat>()

function formatterOf(timeZone: string): Intl.DateTimeFormat {
  const made = formatters.get(timeZone) ?? new Intl.DateTimeFormat('en-GB', {
    timeZone, hourCycle: 'h23', weekday: 'short', day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit', second: '2-digit',
  })
  formatters.set(timeZone, made)
  return made
}

const parts = (instant: Date, timeZone: string) => Object.fromEntries(formatterOf(timeZone).formatToParts(instant).map(part => [part.type, part.value]))

function zonePart(instant: Date, timeZone: string, locale: string, timeZoneName: 'short' | 'shortOffset'): string {
  const found = new Intl.DateTimeFormat(locale, { timeZone, timeZoneName }).formatToParts(instant).find(part => part.type === 'timeZoneName')
  return found?.value ?? timeZone
}

/** The zone by the letters its people use, CET or EST; by its offset where it has none. */
export function zoneWord(instant: Date, timeZone: string): string {
  const spelt = ['en-GB', 'en-US', 'en-AU'].map(locale => zonePart(instant, timeZone, locale, 'short')).find(word => /^[A-Z]{2,5}$/.test(word))
  return spelt ?? offsetWord(instant, timeZone)
}

function offsetWord(instant: Date, timeZone: string): string {
  const offset = zonePart(instant, timeZone, 'en-GB', 'shortOffset').replace('GMT', 'UTC').replace('-', '−')
  return offset === 'UTC' ? 'UTC+0' : offset
}

/** Tue 1 Dec 2026 07:42:10 CET (UTC+1): what a sheet or a log says. */
export function formatExact(iso: string, timeZone: string): string {
  const instant = new Date(iso)
  const p = parts(instant, timeZone)
  return `${p.weekday} ${p.day} ${shortMonth(p.month)} ${p.year} ${p.hour}:${p.minute}:${p.second} ${zoneWord(instant, timeZone)} (${offsetWord(instant, timeZone)})`
}

/** 1 Dec 07:42; with its year once that is not the year of `now`. The zone is named by the column's head. */
export function formatShort(iso: string, timeZone: string, now: Date): string {
  const p = parts(new Date(iso), timeZone)
  const year = p.year === parts(now, timeZone).year ? '' : ` ${p.year}`
  return `${p.day} ${shortMonth(p.month)}${year} ${p.hour}:${p.minute}`
}

/** 19 Nov, with its year once that is not the year of `now`. */
export function formatDay(iso: string, timeZone: string, now: Date): string {
  return formatShort(iso, timeZone, now).replace(/ \d\d:\d\d$/, '')
}

/** British English writes Sept; every month here has three letters, so that columns stand. */
function shortMonth(month: string | undefined): string {
  return (month ?? '').slice(0, 3)
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
