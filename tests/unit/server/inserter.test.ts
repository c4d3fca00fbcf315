import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openVault, type Vault } from '../../../server/database/client'
import { inserter } from '../../../server/database/inserter'
import { rule, site, version } from '../../../server/database/schema'

let vault: Vault
let folder: string
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
  vault = openVault(folder)
})
afterAll(() => {
  vault.close()
  rmSync(folder, { recursive: true })
})

describe('inserter', () => {
  it('answers the new id, and reads back what it wrote, JSON and flags too', () => {
    const insert = inserter(vault.db, site)
    const row = { rev: 1, name: 'Larkfield', timeZone: 'Europe/Berlin', fourEyes: false, releaseHours: 24, knownGoodMonths: 12, watched: ['smoothingTime'], attachmentWanted: true, labelWanted: false, paper: 'A4' as const, madeAt: '2026-01-01T00:00:00.000Z' }
    const id = insert(row)
    expect(vault.db.select().from(site).all()).toEqual([{ id, ...row }])
    expect(insert({ ...row, name: 'Larkfield West' })).toBe(id + 1)
  })

  it('writes NULL for a JSON value that is absent, not the text null', () => {
    vault.sqlite.pragma('foreign_keys = OFF')
    inserter(vault.db, rule)({ scope: 'site', scopeId: 1, field: 'thrustLimit', max: 50, reason: 'guard', madeAt: '2026-01-01T00:00:00.000Z', madeBy: 1 })
    expect(vault.sqlite.prepare('SELECT typeof(fixed) FROM rule').pluck().get()).toBe('null')
    expect(vault.db.select().from(rule).all()).toMatchObject([{ fixed: null, max: 50 }])
  })

  it('leaves generated columns to the database', () => {
    expect(() => inserter(vault.db, version)).not.toThrow()
  })
})
