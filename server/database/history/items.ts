import type Database from 'better-sqlite3'
import type { FindingState } from '#shared/api/findings'
import type { Occasion } from '#shared/api/versions'
import type { Section } from '#shared/diff/types'
import type { ExtraValue, Weight } from '#shared/settings/types'
import type { ChangeKey } from './keys'

/*
 * What the lines of a page say, all lines in one statement: asked line by line, a page took as long as finding it twenty times.
 * The keys stand first in each join, so that they are looked up in the order in which they were found.
 */

export const itemsSql = `SELECT c.version_id AS versionId, c.seq, c.section, c.row, c.field, c.before, c.after, c.unit, c.delta, c.points, c.weight,
    v.axis_id AS axisId, v.number, v.received_at AS receivedAt, v.captured_at AS capturedAt, v.changed_by AS changedBy, v.allowed_by AS allowedBy,
    v.reason, v.work_order AS workOrder, v.occasion, v.late, v.base_id AS baseId, b.number AS baseNumber, b.order_at AS baseAt,
    a.tag, u.serial, p.name AS storer, t.name AS token, s.time_zone AS timeZone, w.at AS voidAt,
    CASE c.watched WHEN 1 THEN (SELECT f.id FROM finding_version fv CROSS JOIN finding f ON f.id = fv.finding_id WHERE fv.version_id = c.version_id AND f.cause = 'watched-change' LIMIT 1) END AS findingId
  FROM json_each(:keys) k CROSS JOIN change c ON c.version_id = k.value ->> 0 AND c.seq = k.value ->> 1
  CROSS JOIN version v ON v.id = c.version_id CROSS JOIN axis a ON a.id = v.axis_id CROSS JOIN machine m ON m.id = a.machine_id
  CROSS JOIN line l ON l.id = m.line_id CROSS JOIN site s ON s.id = l.site_id CROSS JOIN unit u ON u.id = v.unit_id CROSS JOIN person p ON p.id = v.stored_by
  LEFT JOIN token t ON t.id = v.stored_by_token LEFT JOIN version b ON b.id = v.base_id LEFT JOIN version_void w ON w.version_id = v.id`

export const statesSql = 'SELECT s.finding_id AS id, s.state FROM json_each(:ids) i CROSS JOIN finding_state s ON s.finding_id = i.value'
export const actsSql = `SELECT a.id, a.finding_id AS findingId, a.kind, a.text, a.allowed_by AS allowedBy, p.name AS by
  FROM json_each(:ids) i CROSS JOIN finding_act a ON a.finding_id = i.value CROSS JOIN person p ON p.id = a.by_person`

interface StoredItem extends ChangeKey {
  readonly section: Section
  readonly row: number | null
  readonly field: string
  readonly before: string | null
  readonly after: string | null
  readonly unit: string | null
  readonly delta: number | null
  readonly points: number | null
  readonly weight: Weight
  readonly axisId: number
  readonly number: number
  readonly receivedAt: string
  readonly capturedAt: string
  readonly changedBy: string | null
  readonly allowedBy: string | null
  readonly reason: string | null
  readonly workOrder: string | null
  readonly occasion: Occasion
  readonly late: number
  readonly baseId: number | null
  readonly baseNumber: number | null
  readonly baseAt: string | null
  readonly tag: string
  readonly serial: string
  readonly storer: string
  readonly token: string | null
  readonly timeZone: string
  readonly voidAt: string | null
  readonly findingId: number | null
}

/** A change with all that its line says. */
export interface ItemRow extends Omit<StoredItem, 'before' | 'after' | 'late'> { readonly before: ExtraValue | null, readonly after: ExtraValue | null, readonly late: boolean }

const statements = new WeakMap<Database.Database, Map<string, Database.Statement>>()

function all(sqlite: Database.Database, sql: string, values: object): unknown[] {
  const made = statements.get(sqlite) ?? new Map<string, Database.Statement>()
  statements.set(sqlite, made)
  const statement = made.get(sql) ?? sqlite.prepare(sql)
  made.set(sql, statement)
  return statement.all(values)
}

const valueOf = (text: string | null) => (text === null ? null : JSON.parse(text) as ExtraValue)

/** The changes of these keys, in their order; one that is in an index and not in its table is missing. */
export function readItems(sqlite: Database.Database, keys: readonly ChangeKey[]): ItemRow[] {
  const rows = all(sqlite, itemsSql, { keys: JSON.stringify(keys.map(({ versionId, seq }) => [versionId, seq])) }) as StoredItem[]
  return rows.map(row => Object.assign(row, { before: valueOf(row.before), after: valueOf(row.after), late: row.late === 1 }))
}

/** What was said and decided about a finding. */
export interface SaidOfFinding { readonly id: number, readonly findingId: number, readonly kind: 'explained' | 'closed' | 'reopened', readonly text: string | null, readonly allowedBy: string | null, readonly by: string }

/** Where each finding stands, and its acts, oldest first. */
export function readFindings(sqlite: Database.Database, findingIds: readonly number[]): ReadonlyMap<number, { readonly state: FindingState, readonly acts: readonly SaidOfFinding[] }> {
  const ids = JSON.stringify(findingIds)
  const acts = (all(sqlite, actsSql, { ids }) as SaidOfFinding[]).sort((a, b) => a.id - b.id)
  const states = all(sqlite, statesSql, { ids }) as { id: number, state: FindingState }[]
  return new Map(states.map(({ id, state }) => [id, { state, acts: acts.filter(({ findingId }) => findingId === id) }]))
}
