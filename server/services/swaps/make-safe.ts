import type { z } from 'zod'
import type { cautionsBody, safeBody, Swap } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import type { SwapRow } from '#server/database/swap/table'
import { forcesOpen, loadCanFall } from './facts'
import { readSwap } from './read-swap'
import { fitCase, judgeKit, kitCaseOf, type SwapKitCase } from './sides'
import { byNow, openSwapRow, takeStep } from './take-step'

/** Nothing goes to a unit that does not fit without leave, or whose percentages mean other newtons and were not confirmed. */
export function assertMayGoIn(db: VaultDb, swap: SwapRow, goes: SwapKitCase, now: string): void {
  if (swap.fit === 'unfit' && swap.facts.unfit === undefined) {
    const { reasons } = fitCase(db, goes, judgeKit(db, goes), now)
    const errors = reasons.slice(0, 100).map(({ code, message, at }) => ({ at: at[0] ?? '', code, message }))
    const hard = reasons.some(reason => reason.hard)
    throw new Refusal('unfit', `${goes.unit.serial} does not fit: ${errors[0]?.message ?? ''} ${hard ? 'Take another unit.' : 'A planner may allow it, by name.'}`, { errors, more: reasons.length - errors.length })
  }
  if (forcesOpen(swap, goes.kit)) {
    throw new Refusal('forces-unconfirmed', `100 % of force means something else on ${goes.unit.model}: read the ${goes.kit.adjustments.length} values in newtons and confirm them first.`)
  }
}

/** Isolated, blocked, fitted and checked: one confirmation by name, and where a load can fall how it is blocked. */
export function makeSafe(vault: Vault, actor: PersonActor, id: number, { rev, blocked }: z.output<typeof safeBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev)
    const goes = kitCaseOf(db, before)
    if (goes) assertMayGoIn(db, before, goes, write.now)
    const reached = openSwapRow(db, write, id, rev, 'safe')
    if (reached.facts.cautions === undefined) throw new Refusal('cautions-unread', 'Read the cautions first; then make the axis safe.')
    if (goes && loadCanFall(goes.place, goes.kit) && blocked === undefined) {
      const message = 'A load can fall here: say how it is blocked. prop, pin or lowered.'
      throw new Refusal('input', message, { errors: [{ at: '/blocked', code: 'missing', message }] })
    }
    const said = { ...byNow(write), blocked: blocked ?? null }
    takeStep(db, write, reached, { facts: { ...reached.facts, safe: said } }, { act: 'safe', text: `Made safe, fitted and checked${blocked ? `, the load ${blockedWords[blocked]}` : ''}.`, said })
    return readSwap(db, id, write.now)
  })
}

const blockedWords = { prop: 'propped', pin: 'pinned', lowered: 'lowered to its end' } as const

/** The cautions were read: from here on kits of this swap may be taken. */
export function readCautions(vault: Vault, actor: PersonActor, id: number, { rev }: z.output<typeof cautionsBody>): Swap {
  return vault.write(actor, (write) => {
    const before = openSwapRow(vault.db, write, id, rev)
    const cautions = byNow(write)
    takeStep(vault.db, write, before, { facts: { ...before.facts, cautions } }, { act: 'cautions', text: 'The cautions were read.', said: cautions })
    return readSwap(vault.db, id, write.now)
  })
}
