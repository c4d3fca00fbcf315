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

/** A year that nothing here was made in, so that the year is always written. */
const farAway = new Date(0)
