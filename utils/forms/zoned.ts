const pieces = (instant: number, timeZone: string) => {
  const parts = new Intl.DateTimeFormat('en-GB', { timeZone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit' }).formatToParts(instant)
  const of = (type: string) => parts.find(part => part.type === type)?.value ?? '00'
  return `${of('year')}-${of('month')}-${of('day')}T${of('hour')}:${of('minute')}`
}

/** An instant as an input of day and time shows it in that zone: 2026-12-01T08:14. */
export const toLocal = (iso: string, timeZone: string): string => pieces(Date.parse(iso), timeZone)

/**
 * The instant of a local day and time in a zone. Of an hour that comes twice in autumn the first one; of an hour that is
 * left out in spring the instant one hour on. A text that is no day and time stays as it is, for the schema to name.
 */
export function toInstant(local: string, timeZone: string): string {
  const asUtc = Date.parse(`${local}Z`)
  if (Number.isNaN(asUtc)) return local
  const offsetAt = (instant: number) => Date.parse(`${pieces(instant, timeZone)}Z`) - instant
  const day = 24 * 3_600_000
  const [before, after] = [asUtc - offsetAt(asUtc - day), asUtc - offsetAt(asUtc + day)]
  const fits = [before, after].filter(instant => pieces(instant, timeZone) === local)
  return new Date(fits.length > 0 ? Math.min(...fits) : Math.max(before, after)).toISOString()
}
