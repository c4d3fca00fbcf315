import type { z } from 'zod'
import type { closeBody, explainBody, Finding, FindingAct, findingQuery, reopenBody } from '#shared/api/findings'
import { Refusal } from '#shared/errors/refusal'
import type { Actor, PersonActor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import { findingQueries, type StandingFinding } from '#server/database/finding/queries'
import type { VaultDb } from '#server/database/prepared'
import { siteQueries } from '#server/database/site/scope'
import { afterOf, limitOf, pageOf } from '../page'
import { namedPerson, personIn, personName } from '../versions/summary'
import { changesOnWire } from '../wire'
import { actOn } from './raise'
import { assertPutRight } from './put-right'

/** Beyond that the list of one finding is told by its count. */
const mostVersions = 200

/** Findings of the actor's sites, newest first. */
export function listFindings(vault: Vault, actor: Actor, query: z.output<typeof findingQuery>): { items: Finding[], next: string | null } {
  const { state = null, site = null, weight = null, axis } = query
  const axisId = axis === undefined ? null : siteQueries(vault.db).find('axis', axis)?.id ?? 0
  const { page, pageOfState, pageOfAxis } = findingQueries(vault.db)
  const statement = axisId !== null ? pageOfAxis : state !== null ? pageOfState : page
  const rows = statement.all({ below: afterOf(query, Number.MAX_SAFE_INTEGER), limit: limitOf(query) + 1, sites: boundsText(actor.sites), state, siteId: site, weight, axisId })
  const now = vault.now()
  return pageOf(rows, query, ({ finding }) => finding.id, row => findingOnWire(vault.db, row, now))
}

export const readFinding = (vault: Vault, id: number): Finding => findingOnWire(vault.db, standing(vault, id), vault.now())

function standing({ db }: Vault, id: number): StandingFinding {
  const found = findingQueries(db).one.get({ id })
  if (!found) throw new Refusal('not-found', `There is no finding ${id}.`)
  return found
}

/** Says why; more may be said until it is closed. */
export function explainFinding(vault: Vault, actor: PersonActor, id: number, { text, by, at, workOrder }: z.output<typeof explainBody>): Finding {
  return vault.write(actor, (write) => {
    if (actor.shared) throw new Refusal('role', 'An explanation stands under a name: sign in with your own account.')
    if (standing(vault, id).state === 'closed') throw new Refusal('finding-closed', 'This finding is closed. Reopen it to say more.')
    assertPersonKnown(vault.db, by, '/by')
    actOn(vault.db, write, id, { kind: 'explained', byPerson: actor.id, text, madeBy: by ?? null, madeAt: at === undefined ? null : new Date(at).toISOString(), workOrder: workOrder ?? null })
    return readFinding(vault, id)
  })
}

type CloseWords = Omit<z.output<typeof closeBody>, 'password'>

/** Closes what was explained: accepted by whoever allowed it, or put right by a version. Never by who explained it. */
export function closeFinding(vault: Vault, actor: PersonActor, id: number, words: CloseWords): Finding {
  return vault.write(actor, (write) => {
    const { db } = vault
    const { finding, state } = standing(vault, id)
    if (finding.weight === 'harm' && !actor.roles.includes('auditor')) throw new Refusal('role', 'What can hurt someone is closed by an auditor.')
    assertExplainedByOthers(db, actor, id)
    if (state === 'closed') throw new Refusal('finding-closed', 'This finding is closed already.')
    if (state === 'open') throw new Refusal('not-explained', 'Nobody has explained this yet. Someone else explains it, then you close it.')
    const { as, allowedBy = null, versionId = null } = words
    if (as === 'accepted' && !allowedBy) throw missing('/allowedBy', 'Say who allowed it.')
    if (as === 'put-right' && versionId === null) throw missing('/versionId', 'Name the version that shows it put right.')
    assertPersonKnown(db, allowedBy ?? undefined, '/allowedBy')
    if (as === 'put-right' && versionId !== null) assertPutRight(db, finding, versionId)
    actOn(db, write, id, { kind: 'closed', byPerson: actor.id, closeAs: as, ...(as === 'accepted' ? { allowedBy } : { versionId }) })
    return readFinding(vault, id)
  })
}

function assertExplainedByOthers(db: VaultDb, actor: PersonActor, id: number): void {
  const own = findingQueries(db).acts.all({ findingId: id }).find(({ act }) => act.kind === 'explained' && act.byPerson === actor.id)
  if (own) throw new Refusal('four-eyes', `${own.by} explained this finding: another person closes it.`)
}

const missing = (at: string, message: string) => new Refusal('input', message, { errors: [{ at, code: 'missing', message }] })

function assertPersonKnown(db: VaultDb, text: string | undefined, at: string): void {
  const id = personIn(text ?? null)
  if (id !== null && personName(db, id) === undefined) throw new Refusal('input', `There is no person ${id}.`, { errors: [{ at, code: 'not-found', message: `there is no person ${id}` }] })
}

/** Opens a closed finding again; all that was said stays. */
export function reopenFinding(vault: Vault, actor: PersonActor, id: number, { text }: z.output<typeof reopenBody>): Finding {
  return vault.write(actor, (write) => {
    const { finding, state } = standing(vault, id)
    if (state !== 'closed') throw new Refusal('finding-open', 'This finding is not closed.')
    const other = findingQueries(vault.db).openByCause.get({ causeKey: finding.causeKey })
    if (other) throw new Refusal('finding-open', `Finding ${other.id} is open for the same cause: go on there.`)
    actOn(vault.db, write, id, { kind: 'reopened', byPerson: actor.id, text })
    return readFinding(vault, id)
  })
}

function findingOnWire(db: VaultDb, { finding, state, dueAt, timeZone }: StandingFinding, now: string): Finding {
  const queries = findingQueries(db)
  const versions = queries.versions.all({ findingId: finding.id, limit: mostVersions })
  const acts = queries.acts.all({ findingId: finding.id }).map(row => actOnWire(db, row))
  const [first] = versions
  return {
    id: finding.id, state, cause: finding.cause, weight: finding.weight, title: finding.title, axisId: first?.row.axisId ?? null, tag: first?.tag ?? null, timeZone,
    openedAt: finding.openedAt, dueAt, overdue: state !== 'closed' && dueAt < now,
    changes: changesOnWire(versions.flatMap(({ row }) => row.changes)),
    versions: versions.map(({ row, tag, number, capturedAt, baseNumber }) => ({
      at: row.at, axisId: row.axisId, tag, versionId: row.versionId, number, capturedAt, baseId: row.baseId, baseNumber, says: row.says, changes: changesOnWire(row.changes),
    })),
    more: versions.length < mostVersions ? 0 : (queries.countVersions.get({ findingId: finding.id })?.count ?? 0) - versions.length,
    explanations: acts.filter(({ kind }) => kind === 'explained'), closure: state === 'closed' ? acts.findLast(({ kind }) => kind === 'closed') ?? null : null, acts,
  }
}

type ActRow = ReturnType<ReturnType<typeof findingQueries>['acts']['all']>[number]

function actOnWire(db: VaultDb, { act, by, tag, number }: ActRow): FindingAct {
  const { kind, at, text, madeAt, workOrder, plannedChangeId, closeAs, versionId } = act
  return {
    kind, at, by, text, madeBy: namedPerson(db, act.madeBy), madeAt, workOrder, plannedChangeId, as: closeAs, allowedBy: namedPerson(db, act.allowedBy),
    version: versionId !== null && tag !== null && number !== null ? { id: versionId, tag, number } : null,
  }
}
