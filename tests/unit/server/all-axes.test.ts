import { afterAll, expect, it } from 'vitest'
import { axisLists, readAllAxes } from '../../../server/database/axis-state/list'
import type { Vault } from '../../../server/database/client'
import { tellAll } from '../../support/told-vault'
import { freshVault } from '../../support/vault'

let now = Date.parse('2026-03-01T06:00:00.000Z')
const { vault, remove } = freshVault({ clock: () => now })
afterAll(remove)

it('law: the rows that are kept are those of the tables, after every act of every kind', async () => {
  const { db } = vault
  let [depth, looked] = [0, 0]
  const write = vault.write
  const watched: Vault['write'] = (actor, work) => {
    depth += 1
    const answer = write(actor, work)
    depth -= 1
    if (depth === 0) {
      looked += 1
      expect(readAllAxes(db, null)).toEqual(axisLists(db).all.all())
    }
    return answer
  }
  Object.assign(vault, { write: watched })
  expect(readAllAxes(db, null)).toEqual([])
  await tellAll(vault, (milliseconds) => { now += milliseconds })
  expect(looked).toBeGreaterThan(30)
  expect(readAllAxes(db, null).length).toBeGreaterThan(0)
  expect(readAllAxes(db, null)).toBe(readAllAxes(db, null))
})
