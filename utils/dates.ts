/** '30 Nov 2026 06:12': a minute with its year, for lists that reach over years; the zone is named once beside them. */
export function formatMinute(iso: string, timeZone: string): string {
  return formatShort(iso, timeZone, farAway)
}

/** As formatMinute, with the letters of the zone at that very time of the year: CET or CEST. */
export function formatZoned(iso: string, timeZone: string): string {
  return `${formatMinute(iso, timeZone)} ${zoneWord(new Date(iso), timeZone)}`
}

/** '12 Feb 2025'. */
export function formatDate(iso: string, timeZone: string): string {
  return formatDay(iso, timeZone, farAway)
}

/** '02:19 CET' on the day of `now`, else 'Mon 30 Nov 02:19 CET': the clock first, its zone always beside it. */
export function formatWhen(iso: string, timeZone: string, now: Date): string {
  const clock = `${formatShort(iso, timeZone, now).slice(-5)} ${zoneWord(new Date(iso), timeZone)}`
  if (formatDate(iso, timeZone) === formatDate(now.toISOString(), timeZone)) return clock
  return `${formatExact(iso, timeZone).slice(0, 3)} ${formatDay(iso, timeZone, now)} ${clock}`
}

/** A year that nothing here was made in, so that the year is always written. */
const farAway = new Date(0)
