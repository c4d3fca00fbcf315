import type { Lack } from '#shared/api/readiness'

/** What readiness goes by; every instant RFC 3339 UTC. */
export interface ReadinessFacts {
  readonly tag: string
  /** When the known-good in force was marked; null = no version is. */
  readonly markedAt: string | null
  readonly knownGoodMonths: number
  /** When the last file came; the axis' registration where none ever did. */
  readonly lastHeardAt: string
  readonly uploadEveryHours: number | null
  /** Whether a spare in stock fits. */
  readonly spare: boolean
  readonly backups: number
  readonly attachmentWanted: boolean
  /** Tag on the newest printed label. */
  readonly labelTag: string | null
  readonly labelWanted: boolean
}

const hour = 60 * 60_000

/** Why an axis could not be restored tonight, the gravest first; nothing where it could. */
export function lacksOf(facts: ReadinessFacts, now: string): Lack[] {
  const { markedAt, knownGoodMonths, lastHeardAt, uploadEveryHours } = facts
  const holds: [Lack, boolean][] = [
    ['no-known-good', markedAt === null],
    ['too-old', markedAt !== null && monthsAfter(markedAt, knownGoodMonths) < now],
    ['overdue', uploadEveryHours !== null && new Date(Date.parse(lastHeardAt) + uploadEveryHours * hour).toISOString() < now],
    ['no-spare', !facts.spare],
    ['no-attachment', facts.attachmentWanted && facts.backups === 0],
    ['no-label', facts.labelWanted && facts.labelTag?.toLowerCase() !== facts.tag.toLowerCase()],
  ]
  return holds.filter(([, lacking]) => lacking).map(([lack]) => lack)
}

/** The same day of the month so many months on, the month's last day where it has none; in UTC. */
export function monthsAfter(instant: string, months: number): string {
  const date = new Date(instant)
  const day = date.getUTCDate()
  date.setUTCDate(1)
  date.setUTCMonth(date.getUTCMonth() + months)
  const last = new Date(Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + 1, 0)).getUTCDate()
  date.setUTCDate(Math.min(day, last))
  return date.toISOString()
}
