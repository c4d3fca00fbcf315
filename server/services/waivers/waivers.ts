import type { z } from 'zod'
import type { waiverBody, waiverEndBody, WaiverRecord } from '#shared/api/waivers'
import { ruleOf } from '#shared/checks/table'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { waiverQueries, type NamedWaiver } from '#server/database/waiver/queries'
import { refreshAxisState } from '../axes/axis-state'
import { explainWaived, raiseStanding, reopenUnwaived } from '../findings/standing'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { assertPlace } from '../places/bounds'

type WaiverWords = Omit<z.output<typeof waiverBody>, 'password'>
type EndWords = Omit<z.output<typeof waiverEndBody>, 'password'>

/** Takes a stop, or what a stop rule could not judge, upon the signer until an instant yet to come. */
export function giveWaiver(vault: Vault, actor: PersonActor, { axisId, rule, at, value, reason, until }: WaiverWords): { id: number } {
  assertCanStop(rule)
  return vault.write(actor, (write) => {
    assertPlace(vault, actor, 'axis', axisId, '/axisId')
    const untilAt = new Date(until).toISOString()
    if (untilAt <= write.now) throw new Refusal('time-order', 'A waiver ends in the future: choose a later day.', { errors: [{ at: '/until', code: 'time-order', message: 'lies in the past' }] })
    const row = { axisId, rule, places: at, covers: value, reason, untilAt, givenAt: write.now, givenBy: actor.id }
    const id = waiverQueries(vault.db).insert(row)
    write.log({ act: 'waiver-given', id, state: { id, ...row, endedAt: null }, note: reason })
    refreshAxisState(vault.db, axisId)
    explainWaived(vault.db, write, row)
    return { id }
  })
}

/** Warnings and notes hold nothing up, so that there is nothing to accept. */
function assertCanStop(rule: string): void {
  if (ruleOf(rule)?.levels.includes('stop')) return
  throw new Refusal('input', `${rule} is no rule that stops: it needs no waiver.`, { errors: [{ at: '/rule', code: 'rule', message: 'is no rule that stops' }] })
}

/** Takes a waiver back before its end. */
export function endWaiver(vault: Vault, actor: PersonActor, id: number, { reason }: EndWords): WaiverRecord {
  return vault.write(actor, (write) => {
    const { giver: _giver, endedBy: _by, endReason: _reason, ...before } = namedWaiver(vault, id)
    if (before.endedAt !== null) throw new Refusal('already-ended', 'This waiver was taken back already.')
    waiverQueries(vault.db).insertEnd({ waiverId: id, at: write.now, byPerson: actor.id, reason })
    write.log({ act: 'waiver-ended', id, state: { ...before, endedAt: write.now, endedByPerson: actor.id, endReason: reason }, note: reason })
    refreshAxisState(vault.db, before.axisId)
    reopenUnwaived(vault.db, write, before, actor.id, reason)
    raiseStanding(vault.db, write, before.axisId)
    return waiverOnWire(namedWaiver(vault, id))
  })
}

/** The waivers of an axis, newest first. */
export function listWaivers({ db }: Vault, axisId: number, query: PageQuery): { items: WaiverRecord[], next: string | null } {
  const rows = waiverQueries(db).page.all({ axisId, below: afterOf(query, Number.MAX_SAFE_INTEGER), limit: limitOf(query) + 1 })
  return pageOf(rows, query, ({ id }) => id, waiverOnWire)
}

function namedWaiver({ db }: Vault, id: number): NamedWaiver {
  const found = waiverQueries(db).named.get({ id })
  if (!found) throw new Refusal('not-found', `There is no waiver ${id}.`)
  return found
}

export function waiverOnWire({ id, axisId, rule, places, covers, reason, untilAt, giver, givenAt, endedAt, endedBy, endReason }: NamedWaiver): WaiverRecord {
  return { id, axisId, rule, at: places, value: covers as WaiverRecord['value'], reason, until: untilAt, by: giver, givenAt, endedAt, endedBy, endReason }
}
