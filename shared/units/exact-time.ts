/*
 * An instant as people of a place read it. The words come from the zone data that browser and server ship with; no clock is
 * asked, so that a letter, a sheet and a screen say the same of the same instant.
 */

/** Making a formatter costs more than a row of the board does, so each is made once for a zone. */
const formatters = new Map<string, Intl.DateTimeFormat>()

function formatterOf(locale: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${locale} ${options.timeZone} ${options.timeZoneName}`
  const made = formatters.get(key) ?? new Intl.DateTimeFormat(locale, options)
  formatters.set(key, made)
  return made
}

const clockOptions = { hourCycle: 'h23', weekday: 'short', day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit', second: '2-digit' } as const

/** What a clock on the wall of that zone shows at an instant, by name of the part; throws RangeError on an unknown zone. */
export const partsOfTime = (instant: Date, timeZone: string) => Object.fromEntries(formatterOf('en-GB', { timeZone, ...clockOptions }).formatToParts(instant).map(part => [part.type, part.value]))

function zonePart(instant: Date, timeZone: string, locale: string, timeZoneName: 'short' | 'shortOffset'): string {
  const found = formatterOf(locale, { timeZone, timeZoneName }).formatToParts(instant).find(part => part.type === 'timeZoneName')
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
  const p = partsOfTime(instant, timeZone)
  return `${p.weekday} ${p.day} ${shortMonth(p.month)} ${p.year} ${p.hour}:${p.minute}:${p.second} ${zoneWord(instant, timeZone)} (${offsetWord(instant, timeZone)})`
}

/** British English writes Sept; every month here has three letters, so that columns stand. */
export function shortMonth(month: string | undefined): string {
  return (month ?? '').slice(0, 3)
}
