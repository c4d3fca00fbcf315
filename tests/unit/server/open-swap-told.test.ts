import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { axisLists } from '../../../server/database/axis-state/list'
import { listAxes, readAxis } from '../../../server/services/axes/read-axis'
import { readBoard } from '../../../server/services/board/board'
import { releaseSwap } from '../../../server/services/swaps/release'
import { hour, iso } from '../../support/vault-plant'
import { swapPlant } from '../../support/swap-plant'

/* The axis and the board tell of the swap that is open there, in the read that brings the rest of the row. */

let here: ReturnType<typeof swapPlant>
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

const told = () => {
  const alone = readAxis(here.plant.vault, here.axisId).swap
  expect(readBoard(here.plant.vault, here.runa).axes.map(({ swap }) => swap)).toEqual([alone])
  expect(listAxes(here.plant.vault, here.runa, {}).items.map(({ swap }) => swap)).toEqual([alone])
  return alone
}

describe('the swap that is open at an axis', () => {
  it('is told from its opening to its end: who, since when, which step, late or not', () => {
    expect(told()).toBeNull()
    const openedAt = iso(here.plant.now)
    const { id } = here.open()
    expect(told()).toEqual({ id, step: 'unit-in', openedAt, openedBy: 'Tobias Achterberg', runningSince: null, releaseDueAt: iso(here.plant.now + 24 * hour), overdue: false })
    here.unitIn(id)
    here.safe(id)
    expect(told()).toMatchObject({ id, step: 'read-back' })
    here.readBack(id, here.file())
    here.motion(id)
    here.readBack(id, here.file())
    here.running(id)
    const runningSince = iso(here.plant.now)
    expect(told()).toMatchObject({ id, step: 'release', openedAt, runningSince, releaseDueAt: iso(here.plant.now + 24 * hour), overdue: false })
    here.plant.now += 24 * hour + 1
    expect(told()).toMatchObject({ id, overdue: true })
    releaseSwap(here.plant.vault, here.runa, id, { meaning: 'approved' })
    expect(told()).toBeNull()
    expect(here.open().id).toBe(id + 1)
    expect(told()).toMatchObject({ id: id + 1, step: 'unit-in' })
  })

  it('is found by its own index within the one read of all axes', () => {
    const { sql, params } = axisLists(here.plant.vault.db).all.getQuery()
    const plan = here.plant.vault.sqlite.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(...params) as { detail: string }[]
    expect(plan.map(({ detail }) => detail).filter(detail => /\bswap\b/.test(detail))).toEqual(['SEARCH swap USING INDEX swap_open (axis_id=?) LEFT-JOIN'])
    // The axes are gone through once; all the rest is looked up by a key.
    expect(plan.filter(({ detail }) => detail.startsWith('SCAN')).map(({ detail }) => detail)).toHaveLength(1)
  })
})
