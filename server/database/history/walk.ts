import type Database from 'better-sqlite3'
import type { Weight } from '#shared/settings/types'
import { readAxes, versionsOfAxesSql, type Read } from './axes-walk'
import { newestFirst, type ChangeKey } from './keys'

/*
 * Walks over the changes of the vault, newest first: keys only, chunk by chunk, along one index that ends in the key of `change`.
 * What else is asked for is looked up beside each key, so that no walk ever sorts. The plain join of all tables would walk every
 * axis and sort instead.
 */

/** A field wherever it stands: its section and its name in the format. */
export interface NamedField { readonly section: string, readonly field: string }

/** What one walk follows. `nobody`: versions that name nobody who changed them. */
export type Way
  = | ({ readonly by: 'field' } & NamedField)
    | { readonly by: 'weight', readonly weight: Weight }
    | { readonly by: 'unit' | 'storer', readonly id: number }
    | { readonly by: 'axes', readonly ids: readonly number[] }
    | { readonly by: 'changer', readonly text: string }
    | { readonly by: 'nobody' }
    | { readonly by: 'all' }

/** What is looked up beside each key; null asks nothing. */
export interface Asked {
  readonly names: readonly NamedField[] | null
  readonly section: string | null
  readonly row: number | null
  readonly weight: Weight | null
  readonly axisIds: readonly number[] | null
  readonly unitId: number | null
  readonly siteId: number | null
  /** Sites that the actor sees. */
  readonly sites: readonly number[] | null
  /** Who changed or stored it: ids of people, and the texts that name them. */
  readonly people: { readonly ids: readonly number[], readonly texts: readonly string[] } | null
  readonly nobody: boolean
}

/** Versions of a stretch of the vault's own order, both included. */
export interface Stretch { readonly first: number, readonly last: number }

interface Condition { readonly sql: string, readonly needs: readonly Table[] }
type Table = 'change' | 'version' | 'axis' | 'machine' | 'line'

const among = (column: string, name: string) => `${column} IN (SELECT value FROM json_each(:${name}))`

function conditionsOf(asked: Asked): Condition[] {
  const given = (value: unknown, sql: string, ...needs: Table[]): Condition[] => (value === null || value === false ? [] : [{ sql, needs }])
  return [
    ...given(asked.names, among(`c.section || '.' || c.field`, 'names'), 'change'),
    ...given(asked.section, 'c.section = :section', 'change'),
    ...given(asked.row, 'c.row = :row', 'change'),
    ...given(asked.weight, 'c.weight = :weight', 'change'),
    ...given(asked.axisIds, among('v.axis_id', 'axisIds'), 'version'),
    ...given(asked.unitId, 'v.unit_id = :unitId', 'version'),
    ...given(asked.people, `(${among('v.stored_by', 'peopleIds')} OR ${among('v.changed_by', 'peopleTexts')})`, 'version'),
    ...given(asked.nobody, 'v.changed_by IS NULL', 'version'),
    ...given(asked.siteId, 'l.site_id = :siteId', 'version', 'axis', 'machine', 'line'),
    ...given(asked.sites, among('l.site_id', 'sites'), 'version', 'axis', 'machine', 'line'),
  ]
}

const joins: Readonly<Record<Table, string>> = {
  change: 'CROSS JOIN change c ON c.version_id = w.version_id AND c.seq = w.seq',
  version: 'CROSS JOIN version v ON v.id = w.version_id',
  axis: 'CROSS JOIN axis a ON a.id = v.axis_id',
  machine: 'CROSS JOIN machine m ON m.id = a.machine_id',
  line: 'CROSS JOIN line l ON l.id = m.line_id',
}

const alongChange = (where: string) => `SELECT version_id, seq FROM change WHERE ${where} version_id >= :first AND (version_id, seq) < (:versionId, :seq) ORDER BY version_id DESC, seq DESC LIMIT :chunk`
const alongVersion = (where: string) => `SELECT c.version_id, c.seq FROM version v CROSS JOIN change c ON c.version_id = v.id
  WHERE ${where} AND v.id BETWEEN :first AND :versionId AND (v.id < :versionId OR c.seq < :seq) ORDER BY v.id DESC, c.seq DESC LIMIT :chunk`

type IndexWay = Exclude<Way['by'], 'axes'>

const ways: Readonly<Record<IndexWay, string>> = {
  field: alongChange('section = :waySection AND field = :wayField AND'),
  weight: alongChange('weight = :wayWeight AND'),
  all: alongChange(''),
  unit: alongVersion('v.unit_id = :wayId'),
  storer: alongVersion('v.stored_by = :wayId'),
  changer: alongVersion('v.changed_by = :wayText'),
  nobody: alongVersion('v.changed_by IS NULL'),
}

/** What a way answers to by itself: it is only walked where that is asked for. */
const implied: Readonly<Record<IndexWay, Partial<Asked>>> = {
  field: { names: null }, weight: { weight: null }, unit: { unitId: null }, storer: { people: null }, changer: { people: null }, nobody: { nobody: false }, all: {},
}

/** The statement of a walk along `way`, with what is asked beside it. */
export function walkSql(way: IndexWay, asked: Asked): string {
  const conditions = conditionsOf({ ...asked, ...implied[way] })
  const hit = conditions.length === 0 ? '1' : conditions.map(({ sql }) => `ifnull(${sql}, 0)`).join(' AND ')
  return `SELECT w.version_id AS versionId, w.seq AS seq, ${hit} AS hit FROM (${ways[way]}) w ${joinsFor(conditions)}`
}

const joinsFor = (conditions: readonly Condition[], ...but: Table[]) =>
  (Object.keys(joins) as Table[]).filter(table => !but.includes(table) && conditions.some(({ needs }) => needs.includes(table))).map(table => joins[table]).join(' ')

/** More fields than this are sought faster by reading all changes of a version than by looking each up. */
const mostSought = 3

/** What is asked for among the changes of some versions, whose axes were asked for already. */
export function hitsSql(asked: Asked): string {
  const sought = asked.names !== null && asked.names.length <= mostSought ? asked.names.map((_, at) => ` INDEXED BY change_field ON c.section = :section${at} AND c.field = :field${at} AND`) : null
  const conditions = conditionsOf({ ...asked, axisIds: null, ...(sought ? { names: null } : {}) })
  return (sought ?? [' ON']).map(along => `SELECT c.version_id AS versionId, c.seq AS seq FROM json_each(:versionIds) i CROSS JOIN change c${along} c.version_id = i.value
    ${joinsFor(conditions, 'change').replaceAll('w.version_id', 'c.version_id')} WHERE ${['1', ...conditions.map(({ sql }) => sql)].join(' AND ')}`).join(' UNION ALL ')
}

type Values = Record<string, string | number | null>

/** Every name that any of the statements has; those that one does not have are left out by the caller of `prepare`. */
export function walkValues(way: Way, asked: Asked): Values {
  const list = (values: readonly unknown[] | null | undefined) => (values ? JSON.stringify(values) : null)
  return {
    waySection: way.by === 'field' ? way.section : null, wayField: way.by === 'field' ? way.field : null,
    wayWeight: way.by === 'weight' ? way.weight : null, wayId: 'id' in way ? way.id : null, wayText: way.by === 'changer' ? way.text : null,
    names: list(asked.names?.map(({ section, field }) => `${section}.${field}`)), section: asked.section, row: asked.row, weight: asked.weight,
    axisIds: list(asked.axisIds), unitId: asked.unitId, siteId: asked.siteId, sites: list(asked.sites),
    peopleIds: list(asked.people?.ids), peopleTexts: list(asked.people?.texts),
    ...Object.fromEntries((asked.names ?? []).slice(0, mostSought).flatMap(({ section, field }, at) => [[`section${at}`, section], [`field${at}`, field]])),
  }
}

const statements = new WeakMap<Database.Database, Map<string, Database.Statement>>()

function statementOf(sqlite: Database.Database, sql: string): Database.Statement {
  const made = statements.get(sqlite) ?? new Map<string, Database.Statement>()
  statements.set(sqlite, made)
  const statement = made.get(sql) ?? sqlite.prepare(sql)
  made.set(sql, statement)
  return statement
}

const firstChunk = 64
const mostChunk = 1024

/** Reads along a way, newest first, from below a key on; each call goes on where the last one ended. */
export function walkAlong(sqlite: Database.Database, way: Way, asked: Asked, { first }: Stretch, after: ChangeKey): () => Read {
  if (way.by !== 'axes') return readIndex(sqlite, way, asked, first, after)
  const values = walkValues(way, asked)
  return readAxes({
    axisIds: way.ids,
    versionsOf: (axisIds, low, high) => statementOf(sqlite, versionsOfAxesSql).all({ axisIds, low, high }).map(row => (row as { id: number }).id),
    hitsAmong: versionIds => rareAmong(sqlite, asked, values, versionIds) ?? statementOf(sqlite, hitsSql(asked)).all({ ...values, versionIds: JSON.stringify(versionIds) }) as ChangeKey[],
  }, first, after)
}

export const rareSql = 'SELECT version_id AS versionId, seq FROM change INDEXED BY change_field WHERE section = :section0 AND field = :field0 AND version_id BETWEEN :low AND :high LIMIT :limit'

/** Where one field is all that is asked for, and it changed seldom, its changes in the whole stretch are fewer than the versions; null where not. */
function rareAmong(sqlite: Database.Database, asked: Asked, values: Values, versionIds: readonly number[]): ChangeKey[] | null {
  const [low, high] = [versionIds[0], versionIds.at(-1)]
  if (asked.names?.length !== 1 || low === undefined || conditionsOf({ ...asked, axisIds: null, names: null }).length > 0) return null
  const limit = versionIds.length * 2
  const keys = statementOf(sqlite, rareSql).all({ ...values, low, high, limit }) as ChangeKey[]
  const among = new Set(versionIds)
  return keys.length === limit ? null : keys.filter(({ versionId }) => among.has(versionId))
}

function readIndex(sqlite: Database.Database, way: Exclude<Way, { by: 'axes' }>, asked: Asked, first: number, after: ChangeKey): () => Read {
  const statement = statementOf(sqlite, walkSql(way.by, asked))
  const values = walkValues(way, asked)
  let [below, chunk] = [after, firstChunk]
  return () => {
    const rows = statement.all({ ...values, first, versionId: below.versionId, seq: below.seq, chunk }) as { versionId: number, seq: number, hit: number }[]
    const keys = rows.map(({ versionId, seq, hit }) => ({ versionId, seq, hit: hit === 1 })).sort(newestFirst)
    const ended = keys.length < chunk
    below = keys.at(-1) ?? below
    chunk = Math.min(chunk * 2, mostChunk)
    return { keys, entries: keys.length, ended }
  }
}
