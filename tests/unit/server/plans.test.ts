import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { lineRows } from '../../../server/database/line/queries'
import { logQueries } from '../../../server/database/log/queries'
import { machineRows } from '../../../server/database/machine/queries'
import { personQueries } from '../../../server/database/person/queries'
import { ruleRows } from '../../../server/database/rule/queries'
import { sessionQueries } from '../../../server/database/session/queries'
import { siteRows } from '../../../server/database/site/queries'
import { siteQueries } from '../../../server/database/site/scope'
import { tokenQueries } from '../../../server/database/token/queries'
import { unitRows } from '../../../server/database/unit/queries'
import { smallPlant } from '../../support/plant'
import { freshVault } from '../../support/vault'

const { vault, remove } = freshVault()
afterAll(remove)
const { db, sqlite } = vault

/** As many rows as a large plant has, so that the planner chooses as it would there. */
beforeAll(() => {
  const { planner, siteId, lineId, machineId, axisId } = smallPlant(vault)
  const at = vault.now()
  const fill = (count: number, sql: string, ...values: (string | number)[]) => {
    const insert = sqlite.prepare(sql)
    for (let index = 0; index < count; index += 1) insert.run(`N${index}`, ...values)
  }
  sqlite.transaction(() => {
    fill(10_000, `INSERT INTO unit (serial, model, state, site_id, made_at) VALUES (?, 'HL40-200V', 'spare', ?, ?)`, siteId, at)
    fill(2000, 'INSERT INTO machine (name, line_id, made_at) VALUES (?, ?, ?)', lineId, at)
    fill(2000, `INSERT INTO axis (tag, machine_id, axis_kind, made_at) VALUES (?, ?, 'linear', ?)`, machineId, at)
    fill(500, 'INSERT INTO line (name, site_id, made_at) VALUES (?, ?, ?)', siteId, at)
    fill(500, `INSERT INTO site (name, time_zone, made_at) VALUES (?, 'UTC', ?)`, at)
    fill(500, `INSERT INTO person (name, email, roles, site_ids, made_at) VALUES ('Somebody', ?, '[]', '[]', ?)`, at)
    fill(500, `INSERT INTO token (name, secret_hash, scopes, site_ids, owner_id, made_by, made_at, ends_at) VALUES (?, hex(randomblob(32)), '[]', '[]', ?, ?, ?, ?)`, planner.id, planner.id, at, at)
    fill(500, `INSERT INTO session (id_hash, person_id, panel, peer, made_at, seen_at) VALUES (?, ?, 0, '', ?, ?)`, planner.id, at, at)
    fill(500, `INSERT INTO rule (reason, scope, scope_id, field, max, made_at, made_by) VALUES (?, 'axis', ?, 'thrustLimit', 1, ?, ?)`, axisId, at, planner.id)
  })()
  sqlite.exec('ANALYZE')
})

/** Parameters are bound, not written in: the planner must not choose by their values. */
function planOf(statement: { getQuery: () => { sql: string, params: unknown[] } }): string[] {
  const { sql, params } = statement.getQuery()
  return (sqlite.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(...params.map(() => 1)) as { detail: string }[]).map(({ detail }) => detail)
}

describe('paged lists and the look-ups of every request', () => {
  it.each([
    ['sites', siteRows(db).page], ['lines', lineRows(db).page], ['machines', machineRows(db).page], ['units', unitRows(db).page], ['rules', ruleRows(db).page],
    ['people', personQueries(db).page], ['tokens', tokenQueries(db).page], ['log', logQueries(db).from], ['newest entry', logQueries(db).newest],
    ['session', sessionQueries(db).find], ['token', tokenQueries(db).find],
  ] as const)('%s: walk an index, and sort nothing', (_name, statement) => {
    const plan = planOf(statement)
    expect(plan.length).toBeGreaterThan(0)
    expect(plan.filter(detail => /^SCAN (?!json_each|log$)/.test(detail) || detail.includes('TEMP B-TREE'))).toEqual([])
  })

  it('page through ten thousand units', () => {
    let after = 0
    let seen = 0
    for (let page = 0; page < 60; page += 1) {
      const rows = unitRows(db).page.all({ after, limit: 200, sites: '[1]', search: null, state: null, model: null })
      after = rows.at(-1)?.unit.id ?? after
      seen += rows.length
    }
    expect(seen).toBe(10_001)
    expect(siteQueries(db).find('axis', 'tag:lid-02.Z')).toEqual({ id: 1, siteId: 1 })
  })
})
