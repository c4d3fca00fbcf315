import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { codedOf, problemOf } from '../../../server/http/errors'
import { health } from '../../../server/services/health'
import { listLog } from '../../../server/services/log/log'
import { listUnits, registerUnit } from '../../../server/services/units/units'
import { smallPlant } from '../../support/plant'
import { freshVault } from '../../support/vault'

const { vault, remove } = freshVault()
const { planner } = smallPlant(vault)
afterAll(remove)

/** SQLite's own limit on pages gives the very error that a full disk does. */
describe('on a full disk', () => {
  let stored = 0
  let problem: unknown
  let logged = 0
  beforeAll(() => {
    vault.sqlite.pragma(`max_page_count = ${Number(vault.sqlite.pragma('page_count', { simple: true })) + 4}`)
    try {
      for (;; stored += 1) {
        logged = listLog(vault, planner, { limit: 200 }).items.length
        registerUnit(vault, planner, { serial: `F${stored}`, model: 'HL40-200V', location: 'x'.repeat(200), firmware: '1'.repeat(32) })
      }
    }
    catch (error) {
      problem = problemOf(codedOf(error))
    }
  })

  it('a request is refused with 507 and a plain message', () => {
    expect(problem).toMatchObject({ status: 507, code: 'disk-full' })
    expect(stored).toBeGreaterThan(0)
  })

  it('nothing of it is stored by half, and reading goes on', () => {
    const units = listUnits(vault, planner, { limit: 200 }).items.filter(({ serial }) => serial.startsWith('F'))
    expect(units).toHaveLength(stored)
    expect(listLog(vault, planner, { limit: 200 }).items).toHaveLength(logged)
    expect(vault.sqlite.pragma('integrity_check', { simple: true })).toBe('ok')
  })

  it('work goes on once there is room', () => {
    vault.sqlite.pragma('max_page_count = 1000000')
    expect(registerUnit(vault, planner, { serial: `F${stored}`, model: 'HL40-200V' }).id).toBeGreaterThan(0)
  })
})

describe('health', () => {
  it('is failing where the vault cannot be written', () => {
    expect(health(vault)).toEqual({ status: 'ok', verified: true, schema: vault.schema, writable: true, lettersWaitingSince: null })
    const gone = { ...vault, folder: `${vault.folder}/gone` }
    expect(health(gone)).toMatchObject({ status: 'failing', writable: false })
  })
})
