import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { attachmentQueries } from '../../../server/database/attachment/queries'
import { axisLists } from '../../../server/database/axis-state/list'
import { findingQueries } from '../../../server/database/finding/queries'
import { judgingQueries } from '../../../server/database/judging/queries'
import { knownGoodQueries } from '../../../server/database/known-good/queries'
import { labelQueries } from '../../../server/database/label/queries'
import { lifeQueries } from '../../../server/database/life/queries'
import { stockQueries } from '../../../server/database/unit/queries'
import { valueQueries } from '../../../server/database/value/queries'
import { versionQueries } from '../../../server/database/version/queries'
import { waiverQueries } from '../../../server/database/waiver/queries'
import { openPlant, type Plant } from '../../support/vault-plant'

/*
 * On a database with the statistics of a fleet no statement of a page, or of the way that an upload takes, may walk a table or
 * sort one: what takes a millisecond in a small vault takes a second there.
 */

let plant: Plant

beforeAll(() => {
  plant = openPlant()
  plant.person('Runa Haldersen')
  const { sqlite } = plant.vault
  sqlite.pragma('foreign_keys = OFF')
  const upTo = (most: number) => `WITH RECURSIVE n(i) AS (SELECT 1 UNION ALL SELECT i + 1 FROM n WHERE i < ${most})`
  const at = `strftime('%Y-%m-%dT%H:%M:%fZ', '2025-01-01', '+' || i || ' minutes')`
  sqlite.exec(`
    ${upTo(60)} INSERT INTO person (name, email, roles, site_ids, made_at) SELECT 'P', 'p' || i || '@larkfield.example', '[]', '[]', ${at} FROM n;
    ${upTo(20)} INSERT INTO token (name, secret_hash, scopes, site_ids, owner_id, made_by, made_at, ends_at) SELECT 'T', printf('%064d', i), '[]', '[]', 1, 1, ${at}, ${at} FROM n;
    ${upTo(5)} INSERT INTO site (name, time_zone, made_at) SELECT 'Site ' || i, 'UTC', ${at} FROM n;
    ${upTo(20)} INSERT INTO line (site_id, name, made_at) SELECT i % 6 + 1, 'Line ' || i, ${at} FROM n;
    ${upTo(80)} INSERT INTO machine (line_id, name, made_at) SELECT i % 21 + 1, 'Machine ' || i, ${at} FROM n;
    ${upTo(40)} INSERT INTO nameplate_revision (model, revision, nameplate, made_at, made_by) SELECT 'M-' || (i % 9), i, '{}', ${at}, 1 FROM n;
    ${upTo(60)} INSERT INTO rule (scope, scope_id, field, max, reason, made_at, made_by) SELECT 'axis', i, 'thrustLimit', 50, 'guard', ${at}, 1 FROM n;
    ${upTo(400)} INSERT INTO axis (machine_id, tag, axis_kind, made_at) SELECT i % 81 + 1, 'A-' || i, 'linear', ${at} FROM n;
    ${upTo(400)} INSERT INTO unit (serial, model, state, made_at) SELECT 'S-' || i, 'M-' || (i % 9), 'fitted', ${at} FROM n;
    ${upTo(400)} INSERT INTO fitting (axis_id, unit_id, from_at, made_at) SELECT i, i, ${at}, ${at} FROM n;
    ${upTo(20000)} INSERT INTO content (hash, size, text) SELECT printf('%064d', i), 1, x'00' FROM n;
    ${upTo(20000)} INSERT INTO version (axis_id, number, unit_id, upload_id, content_id, occasion, captured_at, received_at, stored_by, engine, copy_hash, scribe_code, model, harm, motion, text, file)
      SELECT i % 400 + 1, i / 400 + 1, i % 400 + 1, 1, i, 'routine', ${at}, ${at}, 1, 'e', 'c', 's', 'M-1', 0, 0, 0, '{}' FROM n;
    ${upTo(20000)} INSERT INTO check_set (version_id, rule_set, judged_at, judged, not_applicable, stop, warn, note, unknown) SELECT i, '1', ${at}, '[]', '[]', 0, 0, 0, 0 FROM n;
    ${upTo(40000)} INSERT INTO sighting (axis_id, version_id, upload_sha256, captured_at, received_at, person_id, peer) SELECT i % 400 + 1, i / 2 + 1, printf('%064d', i), ${at}, ${at}, 1, '' FROM n;
    ${upTo(60000)} INSERT INTO change (version_id, seq, section, field, at, weight, watched) SELECT i / 3 + 1, i % 3, 'setup', 'field' || (i % 40), '/', 'harm', 1 FROM n;
    ${upTo(2000)} INSERT INTO known_good (axis_id, version_id, at, by_person, meaning) SELECT i % 400 + 1, i, ${at}, 1, 'approved' FROM n;
    ${upTo(2000)} INSERT INTO waiver (axis_id, rule, places, covers, reason, until_at, given_at, given_by) SELECT i % 400 + 1, 'travel-span', '[]', '{}', 'r', ${at}, ${at}, i % 60 + 1 FROM n;
    ${upTo(500)} INSERT INTO waiver_end SELECT i * 4, ${at}, 1, 'r' FROM n;
    ${upTo(2000)} INSERT INTO attachment (version_id, kind, name, media_type, size, sha256, received_at, person_id, peer) SELECT i, 'drive-backup', 'n', 'm', 1, printf('%064d', i), ${at}, i % 60 + 1, '' FROM n;
    ${upTo(8000)} INSERT INTO attachment_chunk (attachment_id, seq, bytes) SELECT i / 4 + 1, i % 4, x'00' FROM n;
    ${upTo(2000)} INSERT INTO label_print (axis_id, tag, size, at, by_person) SELECT i % 400 + 1, 'T', '50x25', ${at}, i % 60 + 1 FROM n;
    ${upTo(500)} INSERT INTO version_void SELECT i * 7, ${at}, 1, 'wrong' FROM n;
    ${upTo(400)} INSERT INTO axis_state (axis_id, status, off_harm, off_motion, off_text, current_version_id, known_good_version_id, fitting_id, versions, sightings, stop, warn, note, unknown)
      SELECT i, 'in-line', 0, 0, 0, i, i, i, 50, 100, 0, 0, 0, 0 FROM n;
    ${upTo(6000)} INSERT INTO finding (site_id, cause, cause_key, title, weight, opened_at) SELECT i % 6 + 1, 'watched-change', 'key ' || i, 'changed', 'harm', ${at} FROM n;
    ${upTo(6000)} INSERT INTO finding_version (finding_id, axis_id, version_id, says, changes, at) SELECT i, i % 400 + 1, i, 'changed', '[]', ${at} FROM n;
    ${upTo(12000)} INSERT INTO finding_act (finding_id, kind, at, by_person, text, close_as) SELECT i % 6000 + 1, CASE i % 2 WHEN 0 THEN 'explained' ELSE 'closed' END, ${at}, 1, 'r', CASE i % 2 WHEN 1 THEN 'accepted' END FROM n;
    ${upTo(6000)} INSERT INTO finding_state SELECT i, 'key ' || i, CASE i % 500 WHEN 0 THEN 'open' ELSE 'closed' END, ${at} FROM n;
    ANALYZE;`)
}, 60_000)
afterAll(() => plant.close())

interface Statement { readonly getQuery: () => { sql: string, params: unknown[] } }

/** Nothing of a fleet's size is sorted here: the events, waivers and rules of one axis, the channels of one serial, the findings that wait, the axes of one. */
const maySort = ['life.voids', 'life.takenOut', 'life.findingsClosed', 'life.findings', 'life.swaps', 'judging.channels', 'judging.rules', 'values.rules', 'waivers.notEnded', 'attachments.ofVersion', 'findings.waiting', 'findings.openOfVersion', 'findings.axesOf']
/** The board takes every axis, and every finding that waits: those stand in an index of their own. */
const mayScan = ['axes.all', 'findings.waiting', 'findings.countWaiting']

function statements(): [name: string, plan: string[]][] {
  const { db, sqlite } = plant.vault
  const sets = { versions: versionQueries(db), life: lifeQueries(db), judging: judgingQueries(db), marks: knownGoodQueries(db), axes: axisLists(db), waivers: waiverQueries(db), values: valueQueries(db), attachments: attachmentQueries(db), labels: labelQueries(db), stock: stockQueries(db), findings: findingQueries(db) }
  return Object.entries(sets).flatMap(([set, queries]) => Object.entries(queries).filter(([, query]) => typeof query !== 'function').map(([key, query]): [string, string[]] => {
    const { sql, params } = (query as unknown as Statement).getQuery()
    const plan = sqlite.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(...params.map(param => (typeof param === 'object' ? 1 : param))) as { detail: string }[]
    return [`${set}.${key}`, plan.map(({ detail }) => detail)]
  }))
}

describe('plans on a fleet', () => {
  it('walk an index and sort nothing', () => {
    const all = statements()
    expect(all.length).toBeGreaterThan(20)
    // A subquery in json_each walks the list of sites that was handed in, not a table.
    const scans = all.filter(([name, plan]) => !mayScan.includes(name) && plan.some(line => /^SCAN (?!json_each)/.test(line)))
    const sorts = all.filter(([name, plan]) => !mayScan.includes(name) && !maySort.includes(name) && plan.some(line => line.startsWith('USE TEMP B-TREE')))
    expect(scans).toEqual([])
    expect(sorts).toEqual([])
  })
})
