import type { z } from 'zod'
import type { firstMotionBody, runningBody, Swap } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import { standingResults } from '#shared/swap/motion-results'
import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import type { SwapFacts, SwapRow } from '#server/database/swap/table'
import { asLeftOf, attemptsOf, lastCompared } from './facts'
import { motionItems, readSwap, taughtOf } from './read-swap'
import { kitCaseOf } from './sides'
import { byNow, openSwapRow, takeStep, takerOf } from './take-step'

type Results = NonNullable<SwapFacts['firstMotion']>['results']

/** Results of the first motion, any number at a time; each is kept, the newest of an item holds. Not offered while a value to be taught is missing. */
export function recordMotion(vault: Vault, actor: PersonActor, id: number, { rev, speedPercent, results }: z.output<typeof firstMotionBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev, 'first-motion')
    const goes = kitCaseOf(db, before)
    const missing = goes ? taughtOf(db, goes, lastCompared(attemptsOf(db, before))) : []
    if (missing.length > 0) {
      const errors = missing.map(key => ({ at: key.startsWith('extra:') ? `/extra/${key.slice(6)}` : `/setup/${key}`, code: 'taught-missing', message: `${key} is to be taught and was not read back yet.` }))
      throw new Refusal('taught-missing', `Teach ${missing.join(', ')} first, then read back: without it the axis would move by a value that means another place.`, { errors })
    }
    const known = new Set(goes ? motionItems(goes, speedPercent).map(({ item }) => item) : [])
    const strange = results.flatMap(({ item }, index) => known.has(item) ? [] : [{ at: `/results/${index}/item`, code: 'not-found', message: `${item} is not on the list: ${[...known].slice(0, 12).join(', ')}${known.size > 12 ? ' …' : ''}` }])
    if (strange[0]) throw new Refusal('input', strange[0].message, { errors: strange })
    takeStep(db, write, before, { facts: { ...before.facts, firstMotion: { speedPercent, rev: before.rev + 1, results: withResults(before, write, results) } } }, {
      act: 'first-motion', text: motionWords(speedPercent, results), said: { speedPercent, results },
    })
    return readSwap(db, id, write.now)
  })
}

type Sent = z.output<typeof firstMotionBody>['results']

function withResults({ facts }: SwapRow, write: Write, results: Sent): Results {
  return [...facts.firstMotion?.results ?? [], ...results.map(({ item, outcome, text }) => ({ item, outcome, text: text ?? null, by: takerOf(write), at: write.now }))]
}

function motionWords(speedPercent: number, results: Sent): string {
  const faults = results.filter(({ outcome }) => outcome === 'fault')
  const ok = results.length - faults.length
  return `First motion at ${speedPercent} % speed: ${ok} in order${faults.length === 0 ? '.' : `, fault at ${faults.map(({ item, text }) => text ? `${item} (${text})` : item).join(', ')}.`}`
}

/** The axis runs, and is not released yet. Without a read-back after first motion there is no as-left version, and it says so. */
export function sayRunning(vault: Vault, actor: PersonActor, id: number, { rev, note }: z.output<typeof runningBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev, 'running')
    const faults = standingResults(before.facts.firstMotion?.results ?? []).filter(({ outcome }) => outcome === 'fault')
    if (faults.length > 0) {
      const errors = faults.map(({ item, text }) => ({ at: '', code: item, message: text ?? 'fault' }))
      throw new Refusal('motion-fault', `A fault stands at ${faults.map(({ item }) => item).join(', ')}. Put it right and try it again; or put the old unit back.`, { errors })
    }
    const asLeft = asLeftOf(before, attemptsOf(db, before))
    const said = { ...byNow(write), note: note ?? null }
    const { draft: _draft, ...facts } = before.facts
    const left = asLeft ? `as-left is version ${asLeft.number}` : 'no read-back after first motion, so nothing carries over'
    takeStep(db, write, before, { runningAt: before.runningAt ?? write.now, facts: { ...facts, running: said } }, {
      act: 'running', text: `Running, not released; ${left}.${note ? ` ${note}` : ''}`, said: { ...said, asLeftVersionId: asLeft?.readBack.versionId ?? null },
    })
    return readSwap(db, id, write.now)
  })
}
