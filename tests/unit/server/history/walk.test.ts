import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../../server/database/actor'
import { historyQueries } from '../../../../server/database/history/queries'
import { termQueries } from '../../../../server/database/history/terms'
import { versionsOfAxesSql } from '../../../../server/database/history/axes-walk'
import { actsSql, itemsSql, statesSql } from '../../../../server/database/history/items'
import type { ChangeKey } from '../../../../server/database/history/keys'
import { hitsSql, rareSql, walkSql, walkValues, type Asked, type Way } from '../../../../server/database/history/walk'
import { historyFilter } from '../../../../server/services/history/filter'
import { findKeys, mostEntries, type Plan } from '../../../../server/services/history/merge'
import { iso, openPlant, start, type Plant } from '../../../support/vault-plant'

let plant: Plant
let ines: PersonActor

/** 30,000 versions of 400 axes with three changes each, and statistics as ANALYZE makes them. */
beforeAll(() => {
  plant = openPlant()
  ines = plant.person('Ines Morel', ['auditor'])
  const { sqlite } = plant.vault
  sqlite.pragma('foreign_keys = OFF')
  const upTo = (most: number) => `WITH RECURSIVE n(i) AS (SELECT 1 UNION ALL SELECT i + 1 FROM n WHERE i < ${most})`
  const at = `strftime('%Y-%m-%dT%H:%M:%fZ', '2025-01-01', '+' || i || ' minutes')`
  sqlite.exec(`
    ${upTo(60)} INSERT INTO person (name, email, roles, site_ids, made_at) SELECT 'P', 'p' || i || '@larkfield.example', '[]', '[]', ${at} FROM n;
    ${upTo(5)} INSERT INTO site (name, time_zone, made_at) SELECT 'Site ' || i, 'UTC', ${at} FROM n;
    ${upTo(20)} INSERT INTO line (site_id, name, made_at) SELECT i % 6 + 1, 'Line ' || i, ${at} FROM n;
    ${upTo(80)} INSERT INTO machine (line_id, name, made_at) SELECT i % 20 + 1, 'Machine ' || i, ${at} FROM n;
    ${upTo(400)} INSERT INTO axis (machine_id, tag, axis_kind, made_at) SELECT i % 80 + 1, 'A-' || i, 'linear', ${at} FROM n;
    ${upTo(400)} INSERT INTO unit (serial, model, state, made_at) SELECT 'S-' || i, 'M-1', 'fitted', ${at} FROM n;
    ${upTo(30000)} INSERT INTO version (axis_id, number, unit_id, upload_id, content_id, occasion, captured_at, received_at, changed_by, stored_by, engine, copy_hash, scribe_code, model, harm, motion, text, file)
      SELECT i % 400 + 1, i / 400 + 1, i % 400 + 1, 1, i, 'routine', ${at}, ${at}, CASE i % 3 WHEN 0 THEN 'person:1' END, 1, 'e', 'c', 's', 'M-1', 0, 0, 0, '{}' FROM n;
    ${upTo(90000)} INSERT INTO change (version_id, seq, section, field, at, weight, watched)
      SELECT (i - 1) / 3 + 1, i % 3, 'setup', CASE i % 10 WHEN 0 THEN 'thrustLimit' ELSE 'field' || (i % 40) END, '/', CASE i % 2 WHEN 0 THEN 'harm' ELSE 'motion' END, 1 FROM n;
    ${upTo(2000)} INSERT INTO log (seq, leaf) SELECT i - 1, json_object('subject', json_object('kind', CASE i % 20 WHEN 0 THEN 'site' ELSE 'version' END, 'id', i), 'at', ${at}) FROM n;
    ANALYZE;`)
})
afterAll(() => plant.close())

const nothing: Asked = { names: null, section: null, row: null, weight: null, axisIds: null, unitId: null, siteId: null, sites: null, people: null, nobody: false }
const everything: Asked = { names: [{ section: 'setup', field: 'thrustLimit' }], section: 'setup', row: 1, weight: 'harm', axisIds: [1], unitId: 1, siteId: 1, sites: [1], people: { ids: [1], texts: ['x'] }, nobody: true }
const ways: Exclude<Way, { by: 'axes' }>[] = [
  { by: 'field', section: 'setup', field: 'thrustLimit' }, { by: 'weight', weight: 'harm' }, { by: 'unit', id: 1 }, { by: 'storer', id: 1 },
  { by: 'changer', text: 'person:1' }, { by: 'nobody' }, { by: 'all' },
]
const plan = (sql: string, values: unknown) => (plant.vault.sqlite.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(values as object) as { detail: string }[]).map(({ detail }) => detail)
/** The keys that were read are walked as they come; a list handed in as JSON is no table. The primary key itself is walked for everything. */
const slow = (lines: string[], all = false) => lines.filter(line => line.startsWith('USE TEMP B-TREE') || /^SCAN (?!w$|json_each)/.test(line)).filter(line => !(all && line.includes('SCAN change')))

describe('walks on a fleet', () => {
  it.each(ways.flatMap(way => [[way.by, way, nothing], [`${way.by}, with all that can be asked`, way, everything]] as const))('%s: walks an index and sorts nothing', (_name, way, asked) => {
    const lines = plan(walkSql(way.by, asked), { ...walkValues(way, asked), first: 1, versionId: 20000, seq: 1, chunk: 64 })
    expect(slow(lines)).toEqual([])
    expect(lines.length).toBeGreaterThan(0)
  })

  it.each(['firstFrom', 'lastBefore', 'newest', 'notRead'] as const)('%s: looks up, and sorts nothing', (name) => {
    const { sql, params } = (historyQueries(plant.vault.db)[name] as unknown as { getQuery: () => { sql: string, params: unknown[] } }).getQuery()
    const lines = plan(sql, params.map(param => (typeof param === 'object' ? 1 : param)))
    expect(slow(lines).filter(line => !(name === 'newest' && line === 'SCAN version'))).toEqual([])
  })

  it.each([['nothing', nothing], ['all that can be asked', everything]])('many axes, with %s: a range an axis, and what is asked for by the key of each change', (_name, asked) => {
    const { sqlite } = plant.vault
    const versions = plan(versionsOfAxesSql, { axisIds: '[1,2]', low: 1, high: 9 })
    expect(versions).toEqual(['SCAN a VIRTUAL TABLE INDEX 1:', expect.stringMatching(/^SEARCH v USING COVERING INDEX version_axis \(axis_id=\? AND rowid>\? AND rowid<\?\)$/) as string])
    const hits = plan(hitsSql(asked), { ...walkValues({ by: 'axes', ids: [1] }, asked), versionIds: '[1,2]' })
    expect(hits.filter(line => /^(SCAN (?!i |json_each)|USE TEMP)/.test(line))).toEqual([])
    expect(hits).toContain(asked === nothing ? 'SEARCH c USING PRIMARY KEY (version_id=?)' : 'SEARCH c USING INDEX change_field (section=? AND field=? AND version_id=?)')
    expect(plan(rareSql, { section0: 'setup', field0: 'thrustLimit', low: 1, high: 9, limit: 4 })).toEqual(['SEARCH change USING COVERING INDEX change_field (section=? AND field=? AND version_id>? AND version_id<?)'])
    const manyFields = { ...asked, names: ['a', 'b', 'c', 'd'].map(field => ({ section: 'setup', field })) }
    expect(plan(hitsSql(manyFields), { ...walkValues({ by: 'axes', ids: [1] }, manyFields), versionIds: '[1,2]' })).toContain('SEARCH c USING PRIMARY KEY (version_id=?)')
    expect(sqlite.prepare(hitsSql(asked)).all({ ...walkValues({ by: 'axes', ids: [1] }, asked), versionIds: '[1,2]' }).length).toBe(asked === nothing ? 6 : 0)
  })

  it.each([['items', itemsSql, { keys: '[[1,1]]' }], ['where findings stand', statesSql, { ids: '[1]' }], ['what was said of findings', actsSql, { ids: '[1]' }]])('%s of a page are looked up by the keys that were found, in their order', (_name, sql, values) => {
    const lines = plan(sql, values)
    expect(lines[0]).toMatch(/^SCAN [ki] VIRTUAL TABLE/)
    expect(lines.slice(1).filter(line => /^(SCAN|USE TEMP)/.test(line))).toEqual([])
    expect(lines.length).toBeGreaterThan(1)
  })

  it.each(['axis', 'machine', 'line', 'sites'] as const)('the axes of %s are looked up', (by) => {
    const { sql, params } = (historyQueries(plant.vault.db).axesOf[by] as unknown as { getQuery: () => { sql: string, params: unknown[] } }).getQuery()
    const lines = plan(sql, params.map(() => 1))
    expect(slow(lines)).toEqual([])
    expect(lines.length).toBeGreaterThan(2)
  })

  it.each(['ofKind', 'before', 'at', 'revision', 'markBefore', 'versionNumber'] as const)('%s of the log: looks up, and sorts nothing', (name) => {
    const { sql, params } = (termQueries(plant.vault.db)[name] as unknown as { getQuery: () => { sql: string, params: unknown[] } }).getQuery()
    const lines = plan(sql, params.map(param => (typeof param === 'object' ? 1 : param)))
    expect(slow(lines)).toEqual([])
    if (name === 'ofKind' || name === 'before') expect(lines.join()).toContain('log_terms')
  })
})

describe('what one request reads', () => {
  const { first, last } = { first: 1, last: 30000 }
  const start0 = { versionId: last + 1, seq: 0 }

  it('ends at its bound with a short page that goes on; going on finds the rest', () => {
    const asked = { ...nothing, siteId: 3, row: 7 }
    const found = findKeys(plant.vault.sqlite, [[{ by: 'all' }]], asked, { first, last }, start0, 50)
    expect(found.keys).toEqual([])
    expect(found.next).not.toBeNull()
    const read = 90000 - (found.next!.versionId - 1) * 3
    expect(read).toBeGreaterThan(mostEntries - 1024)
    expect(read).toBeLessThanOrEqual(mostEntries + 1024)
    let next = found.next
    let pages = 1
    while (next !== null) {
      const page = findKeys(plant.vault.sqlite, [[{ by: 'all' }]], asked, { first, last }, next, 50)
      next = page.next
      pages += 1
    }
    expect(pages).toBe(5)
  })

  it('law: the same keys come whichever way is walked', () => {
    const { sqlite } = plant.vault
    const asked: Asked = { ...nothing, names: [{ section: 'setup', field: 'thrustLimit' }], axisIds: [5, 9], weight: 'harm' }
    const through = (plans: Plan[], limit: number) => {
      const keys: ChangeKey[] = []
      for (let after: ChangeKey | null = start0; after !== null;) {
        const page = findKeys(sqlite, plans, asked, { first: 1000, last }, after, limit)
        keys.push(...page.keys)
        after = page.next
      }
      return keys
    }
    const expected = sqlite.prepare(`SELECT c.version_id AS versionId, c.seq FROM change c JOIN version v ON v.id = c.version_id WHERE c.field = 'thrustLimit' AND c.weight = 'harm' AND v.axis_id IN (5, 9) AND v.id >= 1000 ORDER BY 1 DESC, 2 DESC`).all()
    expect(expected.length).toBeGreaterThan(5)
    const axes: Plan = [{ by: 'axes', ids: [5, 9] }]
    const field: Plan = [{ by: 'field', section: 'setup', field: 'thrustLimit' }]
    const plans: Plan[] = [[{ by: 'axes', ids: [5] }, { by: 'axes', ids: [9] }], axes, field, [{ by: 'weight', weight: 'harm' }], [{ by: 'all' }], [{ by: 'storer', id: 1 }, { by: 'all' }]]
    for (const limit of [7, 200]) {
      for (const along of plans) expect(through([along], limit)).toEqual(expected)
      expect(through([axes, field], limit)).toEqual(expected)
      expect(through([field, [{ by: 'all' }], axes], limit)).toEqual(expected)
    }
  })

  it('law: many axes are walked like the join of their versions, from any key on', () => {
    const { sqlite } = plant.vault
    fc.assert(fc.property(fc.uniqueArray(fc.integer({ min: 1, max: 420 }), { minLength: 2, maxLength: 60 }), fc.integer({ min: 1, max: 30001 }), fc.integer({ min: 0, max: 4 }), fc.integer({ min: 1, max: 20000 }), fc.constantFrom(['field7'], ['thrustLimit'], ['field7', 'field8', 'thrustLimit', 'field2']), (ids, versionId, seq, from, fields) => {
      const asked: Asked = { ...nothing, names: fields.map(field => ({ section: 'setup', field })) }
      const found = findKeys(sqlite, [[{ by: 'axes', ids }]], { ...asked, axisIds: ids }, { first: from, last }, { versionId, seq }, 40)
      const expected = sqlite.prepare(`SELECT c.version_id AS versionId, c.seq FROM change c JOIN version v ON v.id = c.version_id
        WHERE c.field IN (SELECT value FROM json_each(?)) AND v.axis_id IN (SELECT value FROM json_each(?)) AND v.id >= ? AND (c.version_id, c.seq) < (?, ?) ORDER BY 1 DESC, 2 DESC LIMIT 40`).all(JSON.stringify(fields), JSON.stringify(ids), from, versionId, seq)
      expect(found.keys).toEqual(expected)
    }), { numRuns: 60 })
  })

  it('has a page of a rare field on a large place from the plan that reads least', () => {
    const ids = Array.from({ length: 400 }, (_, index) => index + 1)
    let read = 0
    const counting = new Proxy(plant.vault.sqlite, {
      get: (target, name) => name === 'prepare'
        ? (sql: string) => {
            const statement = target.prepare(sql)
            return { all: (values: object) => {
              const rows = statement.all(values)
              read += rows.length
              return rows
            } }
          }
        : Reflect.get(target, name) as unknown,
    })
    const asked: Asked = { ...nothing, names: [{ section: 'setup', field: 'nobody changed it' }], axisIds: ids }
    expect(findKeys(counting, [[{ by: 'axes', ids }], [{ by: 'field', section: 'setup', field: 'nobody changed it' }]], asked, { first, last }, start0, 50)).toEqual({ keys: [], next: null })
    expect(read).toBeLessThan(5000)
  })

  it('chooses the plans that may read least', () => {
    const by = (query: Parameters<typeof historyFilter>[2], actor = ines) => historyFilter(plant.vault, actor, query).plans.map(ways => ways.map(way => way.by).join(' '))
    expect(by({ axis: '5' })).toEqual(['axes'])
    expect(by({ axis: '5', field: 'thrustLimit' })).toEqual(['axes'])
    expect(by({ machine: 4, field: 'thrustLimit' })).toEqual(['axes'])
    expect(by({ axis: '5', machine: 9 })).toEqual(['axes'])
    expect(by({ machine: 4 })).toEqual(['axes'])
    expect(by({ field: 'targets', line: 2 })).toEqual(['axes', 'field field field'])
    expect(by({ field: 'targets', site: 1 })).toEqual(['axes', 'field field field'])
    expect(by({ field: 'targets' })).toEqual(['field field field'])
    expect(by({ by: 'Ines Morel' })).toEqual(['storer changer changer'])
    expect(by({ by: 'nobody', field: 'thrustLimit' })).toEqual(['field'])
    expect(by({ by: 'nobody' })).toEqual(['nobody'])
    expect(by({ weight: 'harm', site: 1 })).toEqual(['axes', 'weight'])
    expect(by({ from: iso(start) })).toEqual(['all'])
    expect(by({ from: iso(start) }, { ...ines, sites: [1, 2] })).toEqual(['axes'])
  })

  it('finds a stretch of time by the vault’s own order', () => {
    const stretch = (from?: string, to?: string) => historyFilter(plant.vault, ines, { ...(from && { from }), ...(to && { to }) }).stretch
    expect(stretch()).toEqual({ first: 1, last: 30000 })
    expect(stretch('2025-01-01T01:00:00Z', '2025-01-01T02:00:00Z')).toEqual({ first: 60, last: 119 })
    expect(stretch('2030-01-01T00:00:00Z')).toEqual({ first: 30001, last: 30000 })
    expect(stretch(undefined, '2020-01-01T00:00:00Z')).toEqual({ first: 1, last: 0 })
  })
})
