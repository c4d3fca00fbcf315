import type { Vault } from '../../server/database/client'
import { axisLists } from '../../server/database/axis-state/list'
import { findingQueries } from '../../server/database/finding/queries'
import { versionsOfAxesSql } from '../../server/database/history/axes-walk'
import { actsSql, itemsSql } from '../../server/database/history/items'
import { historyQueries } from '../../server/database/history/queries'
import { termQueries } from '../../server/database/history/terms'
import { hitsSql, walkSql, walkValues, type Asked, type Way } from '../../server/database/history/walk'
import { logQueries } from '../../server/database/log/queries'
import { unitRows } from '../../server/database/unit/queries'
import { versionQueries } from '../../server/database/version/queries'

/*
 * How SQLite goes about the paged lists on this very vault, after ANALYZE: none may walk a table or sort in a tree of its own.
 */

export interface Plan { readonly name: string, readonly plan: readonly string[], readonly holds: boolean }

const nothing: Asked = { names: null, section: null, row: null, weight: null, axisIds: null, unitId: null, siteId: null, sites: null, people: null, nobody: false }
const ways: readonly Exclude<Way, { by: 'axes' }>[] = [
  { by: 'field', section: 'setup', field: 'thrustLimit' }, { by: 'weight', weight: 'harm' }, { by: 'unit', id: 1 }, { by: 'storer', id: 1 }, { by: 'changer', text: 'person:1' }, { by: 'nobody' }, { by: 'all' },
]

/** Keys that were read before, lists that were handed in, the key itself, newest first, for what has no condition; and the tokens, of which this plant has one. */
const mayWalk = /^SCAN (w|[aikn] VIRTUAL TABLE.*|json_each VIRTUAL TABLE.*|log|change|t(oken)? LEFT-JOIN)$/

interface Prepared { readonly getQuery: () => { sql: string, params: unknown[] } }

export function plansOf({ sqlite, db }: Vault): Plan[] {
  const planned = (name: string, sql: string, values: unknown): Plan => {
    const plan = (sqlite.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(values) as { detail: string }[]).map(({ detail }) => detail)
    return { name, plan, holds: plan.length > 0 && !plan.some(line => line.includes('TEMP B-TREE') || (line.startsWith('SCAN ') && !mayWalk.test(line))) }
  }
  const statement = (name: string, prepared: unknown) => {
    const { sql, params } = (prepared as Prepared).getQuery()
    return planned(name, sql, params.map(param => (typeof param === 'object' ? 1 : param)))
  }
  const axes: Asked = { ...nothing, names: [{ section: 'setup', field: 'thrustLimit' }] }
  const history = historyQueries(db)
  return [
    ...ways.map(way => planned(`history along ${way.by}`, walkSql(way.by, nothing), { ...walkValues(way, nothing), first: 1, versionId: 1_000_000, seq: 0, chunk: 64 })),
    planned('history of many axes, their versions', versionsOfAxesSql, { axisIds: '[1,2]', low: 1, high: 100 }),
    planned('history of many axes, their changes', hitsSql(axes), { ...walkValues({ by: 'axes', ids: [] }, axes), versionIds: '[1,2]' }),
    ...(['axis', 'machine', 'line', 'sites'] as const).map(by => statement(`axes of ${by}`, history.axesOf[by])),
    planned('history, its lines', itemsSql, { keys: '[[1,0]]' }), planned('history, what was said of findings', actsSql, { ids: '[1]' }),
    ...(['firstFrom', 'lastBefore', 'notRead'] as const).map(name => statement(`history, ${name}`, history[name])),
    statement('acts of a kind', termQueries(db).ofKind), statement('axes', axisLists(db).page), statement('versions of an axis', versionQueries(db).page),
    ...(['page', 'pageOfState', 'pageOfAxis'] as const).map(name => statement(`findings, ${name}`, findingQueries(db)[name])), statement('log', logQueries(db).from), statement('units', unitRows(db).page),
  ]
}
