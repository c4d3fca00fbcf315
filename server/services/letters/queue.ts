import { randomBytes } from 'node:crypto'
import type { LetterKind, LetterKindOf } from '#shared/api/letters'
import type { Write } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { letterQueries } from '#server/database/letter/queries'
import { personQueries } from '#server/database/person/queries'
import type { PersonRow } from '#server/database/person/table'
import type { VaultDb } from '#server/database/prepared'
import { listSites } from '#server/database/site/queries'
import { barredFrom, watchersOf, type Reach } from './access'
import { axisWords, vaultWords, type AxisFacts, type VaultFacts, type Words } from './words'

/*
 * Letters are written within the write that causes them: what is rolled back tells nobody, what is stored tells everybody
 * whom it concerns. One letter a person, kind and cause, however often it is asked for. Sending comes later (send.ts).
 */

/** Writes one letter, unless the person is barred from it or has one of the same kind and cause. Answers its id; null where none was written. */
export function queueLetter(db: VaultDb, write: Write, person: PersonRow, reach: Reach, words: Words): number | null {
  const { kind, axisId, siteIds } = reach
  const queries = letterQueries(db)
  if (queries.byCause.get({ personId: person.id, kind, cause: words.cause }) !== undefined) return null
  if (barredFrom(db, person, reach) !== null) return null
  return queries.insert({
    messageId: `${randomBytes(16).toString('hex')}@witnessmark`, personId: person.id, kind, cause: words.cause, axisId, siteIds: [...siteIds],
    title: words.title, paragraphs: [...words.paragraphs], path: words.path, madeAt: write.now, state: 'queued', attempts: 0, nextTryAt: write.now,
  })
}

/**
 * Tells those who watch the axis, its machine, line or site, and want letters of the kind; not the person who acts: they know.
 * Answers who was written to; `but` leaves out who was told the same in another letter.
 */
export function tellWatchers<Kind extends LetterKindOf<'watchers'>>(db: VaultDb, write: Write, kind: Kind, axisId: number, facts: AxisFacts[Kind], but: readonly number[] = []): number[] {
  const place = judgingQueries(db).axis.get({ id: axisId })
  if (!place) throw new RangeError(`There is no axis ${axisId} to tell of.`)
  const { axis, machine, line, site } = place
  const words = axisWords[kind](facts, { tag: axis.tag, machine: machine.name, line: line.name, zone: site.timeZone })
  const acting = write.actor.kind === 'person' ? write.actor.id : 0
  return watchersOf(db, place).filter(id => id !== acting && !but.includes(id)).filter(id => written(db, write, id, { kind, axisId, siteIds: [site.id] }, words))
}

/** Tells everyone without site bounds whose role gets letters of the kind. */
export function tellVault<Kind extends LetterKindOf<'vault'>>(db: VaultDb, write: Write, kind: Kind, facts: VaultFacts[Kind]): number[] {
  const words = vaultWords[kind](facts, listSites(db, null)[0]?.timeZone ?? 'UTC')
  return personQueries(db).names.all().map(({ id }) => id).filter(id => written(db, write, id, { kind, axisId: null, siteIds: [] }, words))
}

function written(db: VaultDb, write: Write, personId: number, reach: Reach & { kind: LetterKind }, words: Words): boolean {
  const person = personQueries(db).byId.get({ id: personId })
  return person !== undefined && queueLetter(db, write, person, reach, words) !== null
}
