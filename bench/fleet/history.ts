import type { PersonActor } from '../../server/database/actor'
import type { Vault } from '../../server/database/client'
import { listHistory } from '../../server/services/history/history'
import type { HistoryQuery } from '../../shared/api/history'
import type { Figure } from '../figure'
import { keyName } from './chain'
import { figuresOf, spread, timesOf } from './times'

/*
 * What an auditor asks, by the service that answers the route, its answer written as JSON, in this process: the work in the
 * server without the way to it. Each asking is another one.
 */

const askings = 400
const aim = 10
const day = 86_400_000
const fields = ['frictionForce', 'smoothingTime', 'thrustLimit', `extra:${keyName(3)}`, 'move.speed', 'move.label'] as const

export interface Extent { readonly axes: number, readonly lines: number, readonly versions: number, readonly from: number, readonly to: number }

export function extentOf({ sqlite }: Vault): Extent {
  const one = (sql: string) => sqlite.prepare(sql).pluck().get()
  return {
    axes: Number(one('SELECT max(id) FROM axis')), lines: Number(one('SELECT max(id) FROM line')), versions: Number(one('SELECT max(id) FROM version')),
    from: Date.parse(String(one('SELECT received_at FROM version ORDER BY id LIMIT 1'))), to: Date.parse(String(one('SELECT received_at FROM version ORDER BY id DESC LIMIT 1'))),
  }
}

export const historyQuestions: Readonly<Record<string, (at: number, extent: Extent) => HistoryQuery>> = {
  'one field on one axis': (at, { axes }) => ({ axis: String(1 + spread(at, axes)), field: fieldOf(at) }),
  'one field across the plant, first page': at => ({ field: fieldOf(at) }),
  'one field across the plant, deep page': (at, { versions }) => ({ field: fieldOf(at), cursor: `${1 + spread(at, versions)}.0` }),
  'a family of fields across the plant': at => ({ field: at % 2 === 0 ? 'force-limits' : 'limits' }),
  'one line': (at, { lines }) => ({ line: 1 + spread(at, lines) }),
  'one line, deep page': (at, { lines, versions }) => ({ line: 1 + spread(at, lines), cursor: `${1 + spread(at * 7, versions)}.0` }),
  'one field on one line': (at, { lines }) => ({ line: 1 + spread(at, lines), field: fieldOf(at) }),
  'one field on one machine': (at, { axes }) => ({ machine: 1 + spread(at, Math.ceil(axes / 8)), field: fieldOf(at) }),
  'a field that nobody changed, on one line': (at, { lines }) => ({ line: 1 + spread(at, lines), field: 'brakeFitted' }),
  'a day': (at, extent) => ({ ...dayOf(at, extent) }),
  'one field in a day': (at, extent) => ({ ...dayOf(at, extent), field: fieldOf(at) }),
  'what one person changed': () => ({ by: 'Tobias Achterberg' }),
}

const fieldOf = (at: number) => fields[at % fields.length] ?? 'thrustLimit'

function dayOf(at: number, { from, to }: Extent): { from: string, to: string } {
  const begin = from + spread(at, Math.max(1, to - from - day))
  return { from: new Date(begin).toISOString(), to: new Date(begin + day).toISOString() }
}

export function measureHistory(vault: Vault, actor: PersonActor): Figure[] {
  const extent = extentOf(vault)
  return Object.entries(historyQuestions).flatMap(([name, question]) =>
    figuresOf(`history in the server, CPU: ${name}`, timesOf(askings, at => JSON.stringify(listHistory(vault, actor, question(at, extent)))), aim))
}
