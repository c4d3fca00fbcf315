/** '30 Nov 2026 06:12': a minute with its year, for lists that reach over years; the zone is named once beside them. */
export function formatMinute(iso: string, timeZone: string): string {
  return formatShort(iso, timeZone, farAway)
}

/** '12 Feb 2025'. */
export function formatDate(iso: string, timeZone: string): string {
  return formatDay(iso, timeZone, farAway)
}

/** A year that nothing here was made in, so that the year is always written. */
const farAway = new Date(0)
