import { termsOf, type LetterKind } from '#shared/api/letters'
import { judgingQueries } from '#server/database/judging/queries'
import { letterQueries } from '#server/database/letter/queries'
import type { PersonRow } from '#server/database/person/table'
import type { VaultDb } from '#server/database/prepared'
import { watchQueries } from '#server/database/watch/queries'

/** What a letter is about, as far as it decides who may have it. */
export interface Reach { readonly kind: LetterKind, readonly axisId: number | null, readonly siteIds: readonly number[] }

/** Why a person must not have a letter today; null where they may, and want it. Asked when it is written and again when it leaves. */
export function barredFrom(db: VaultDb, person: PersonRow, { kind, axisId, siteIds }: Reach): string | null {
  const { may, reach } = termsOf(kind)
  if (person.endedAt !== null) return `${person.name} has left.`
  if (!person.roles.some(role => may.includes(role))) return `${person.name} has no role any more that gets it.`
  if (reach === 'vault' && person.siteIds.length > 0) return `${person.name} sees some sites only, and it is about the whole vault.`
  const place = axisId === null ? undefined : judgingQueries(db).axis.get({ id: axisId })
  const sites = place ? [...siteIds, place.site.id] : siteIds
  if (person.siteIds.length > 0 && sites.some(id => !person.siteIds.includes(id))) return `${person.name} does not see the site any more.`
  if (!wants(db, person, kind)) return `${person.name} does not want letters of this kind.`
  if (reach === 'watchers' && !(place && watchersOf(db, place).includes(person.id))) return `${person.name} does not watch the axis any more.`
  return null
}

/** What the person chose; without a choice, what their roles get unasked. */
export function wants(db: VaultDb, { id, roles }: Pick<PersonRow, 'id' | 'roles'>, kind: LetterKind): boolean {
  return letterQueries(db).choice.get({ personId: id, kind })?.wanted ?? roles.some(role => termsOf(kind).unasked.includes(role))
}

interface Place { readonly axis: { id: number }, readonly machine: { id: number }, readonly line: { id: number }, readonly site: { id: number } }

/** Who watches the axis, or its machine, line or site. */
export function watchersOf(db: VaultDb, { axis, machine, line, site }: Place): number[] {
  return watchQueries(db).ofAxis.all({ axisId: axis.id, machineId: machine.id, lineId: line.id, siteId: site.id }).map(({ personId }) => personId)
}
