import Database from 'better-sqlite3'
import { join } from 'node:path'
import type { TestServer } from './server'

/** What tests of the running server register before they upload; all through the routes, as the planner. */
export interface ServerPlant {
  readonly siteId: number
  readonly machineId: number
  readonly as: { readonly planner: string, readonly technician: string, readonly auditor: string }
  /** An axis with a unit fitted to it since 2020. */
  readonly axis: (tag: string, serial: string, options?: { kind?: 'linear' | 'rotary', model?: string, flags?: string[], channel?: number, machineId?: number, firmware?: string }) => Promise<{ axisId: number, unitId: number }>
  readonly post: (path: string, body: unknown) => Promise<number>
  readonly upload: (bytes: Buffer | string, query?: string, options?: { as?: string, type?: string, key?: string }) => ReturnType<TestServer['call']>
  /** How many rows each table holds, read beside the server. */
  readonly rows: () => Record<string, number>
}

export const since = '2020-01-01T00:00:00Z'

export async function plantOn(server: TestServer): Promise<ServerPlant> {
  const as = { planner: await server.signIn('planner'), technician: await server.signIn('technician'), auditor: await server.signIn('auditor') }
  const post = async (path: string, body: unknown): Promise<number> => {
    const { status, text, json } = await server.call('POST', path, { as: as.planner, body })
    if (status !== 201) throw new Error(`${path} answered ${status}: ${text}`)
    return (json as unknown as { id: number }).id
  }
  const siteId = await post('/api/sites', { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' })
  const lineId = await post('/api/lines', { siteId, name: 'Jar line 1' })
  const machineId = await post('/api/machines', { lineId, name: 'Lid press 2' })
  return {
    siteId, machineId, as, post,
    axis: async (tag, serial, { kind = 'linear', model = 'HL40-200V', flags = [], channel, machineId: at = machineId, firmware } = {}) => {
      const axisId = await post('/api/axes', { machineId: at, tag, axisKind: kind, flags })
      const unitId = await post('/api/units', { serial, model, ...(channel === undefined ? {} : { channel }), ...(firmware === undefined ? {} : { firmware }) })
      await post('/api/fittings', { axisId, unitId, at: since })
      return { axisId, unitId }
    },
    upload: (bytes, query = '', { as: who = as.technician, type = 'application/json', key } = {}) => server.call('POST', `/api/uploads${query}`, { as: who, raw: bytes, headers: { 'content-type': type, ...(key === undefined ? {} : { 'idempotency-key': key }) } }),
    rows: () => countRows(server.folder),
  }
}

function countRows(folder: string): Record<string, number> {
  const sqlite = new Database(join(folder, 'vault.sqlite'), { readonly: true })
  try {
    const tables = sqlite.prepare(`SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite_%'`).pluck().all() as string[]
    return Object.fromEntries(tables.map(table => [table, sqlite.prepare(`SELECT count(*) FROM "${table}"`).pluck().get() as number]))
  }
  finally {
    sqlite.close()
  }
}
