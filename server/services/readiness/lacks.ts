import type { Lack } from '#shared/api/readiness'
import { onceFor } from '#shared/motion/once'

/** What readiness goes by; every instant RFC 3339 UTC. */
export interface ReadinessFacts {
  readonly tag: string
  /** When the known-good in force was marked; null = no version is. */
  readonly markedAt: string | null
  readonly knownGoodMonths: number
  /** When the last file came; the axis' registration where none ever did. */
  readonly lastHeardAt: string
  readonly uploadEveryHours: number | null
  readonly backups: number
  readonly attachmentWanted: boolean
  /** Tag on the newest printed label. */
  readonly labelTag: string | null
  readonly labelWanted: boolean
}

const hour = 60 * 60_000

/** From when on the mark is too old, and the next file overdue; null = never. Reckoned once for an axis: a board asks for thousands. */
const daysOf = onceFor(({ markedAt, knownGoodMonths, lastHeardAt, uploadEveryHours }: ReadinessFacts) => ({
  oldAt: markedAt === null ? null : monthsAfter(markedAt, knownGoodMonths),
  dueAt: uploadEveryHours === null ? null : new Date(Date.parse(lastHeardAt) + uploadEveryHours * hour).toISOString(),
}))

/** Until when, that instant included, the passing of time alone changes nothing; null = for good. */
export function standsUntil(facts: ReadinessFacts, now: string): string | null {
  const { oldAt, dueAt } = daysOf(facts)
  return [oldAt, dueAt].filter(at => at !== null && at >= now).sort()[0] ?? null
}

/** Why an axis could not be restored tonight, the gravest first; nothing where it could. `spare`: whether one in stock fits. */
export function lacksOf(facts: ReadinessFacts, spare: boolean, now: string): Lack[] {
  const { oldAt, dueAt } = daysOf(facts)
  const found: Lack[] = []
  if (facts.markedAt === null) found.push('no-known-good')
  if (oldAt !== null && oldAt < now) found.push('too-old')
  if (dueAt !== null && dueAt < now) found.push('overdue')
  if (!spare) found.push('no-spare')
  if (facts.attachmentWanted && facts.backups === 0) found.push('no-attachment')
  if (facts.labelWanted && facts.labelTag?.toLowerCase() !== facts.tag.toLowerCase()) found.push('no-label')
  return found
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
