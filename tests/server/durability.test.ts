import Database from 'better-sqlite3'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { parseLeaf } from '../../shared/trail/entry'
import { startServer } from '../support/server'

const folder = mkdtempSync(join(tmpdir(), 'witnessmark-killed-'))
afterAll(() => { rmSync(folder, { recursive: true, force: true }) })

/** Eight senders register units as fast as they can until the server is killed under them. */
describe('what was answered with 201 before kill -9', () => {
  const answered = new Map<string, number>()
  let sent = 0
  beforeAll(async () => {
    const server = await startServer({ folder, seeded: true })
    const as = await server.signIn('planner')
    const sender = async (name: string) => {
      for (let count = 0; ; count += 1) {
        const serial = `${name}-${count}`
        sent += 1
        const { status, json } = await server.call('POST', '/api/units', { as, body: { serial, model: 'HL40-200V' }, headers: { 'idempotency-key': serial } })
        if (status === 201) answered.set(serial, Number(json.id))
      }
    }
    const senders = Promise.allSettled(Array.from({ length: 8 }, (_, index) => sender(`S${index}`)))
    while (answered.size < 300) await new Promise(resolve => setTimeout(resolve, 5))
    await server.stop('SIGKILL')
    await senders
  })

  it('is there after the restart, under the id that was answered, and answers its key alike', async () => {
    expect(sent).toBeGreaterThanOrEqual(answered.size)
    const server = await startServer({ folder })
    const as = await server.signIn('planner')
    const found = new Map<string, number>()
    let cursor: string | null = null
    do {
      const page: { items: { serial: string, id: number }[], next: string | null } = (await server.call('GET', `/api/units?limit=200${cursor === null ? '' : `&cursor=${cursor}`}`, { as })).json as never
      for (const { serial, id } of page.items) found.set(serial, id)
      cursor = page.next
    } while (cursor !== null)
    expect([...answered].filter(([serial, id]) => found.get(serial) !== id)).toEqual([])
    const [serial = '', id] = [...answered].at(-1) ?? []
    const again = await server.call('POST', '/api/units', { as, body: { serial, model: 'HL40-200V' }, headers: { 'idempotency-key': serial } })
    expect([again.status, Number(again.json.id), again.headers.get('idempotency-replayed')]).toEqual([201, id, 'true'])
    await server.stop()
  })

  it('and nothing is there by half: every unit has its log entry, every entry its unit', () => {
    const file = new Database(join(folder, 'vault.sqlite'), { readonly: true })
    const units = file.prepare('SELECT id FROM unit ORDER BY id').pluck().all()
    const entries = (file.prepare('SELECT leaf FROM log ORDER BY seq').pluck().all() as string[]).map(parseLeaf)
    expect(entries.map(({ seq }) => seq)).toEqual(entries.map((_, index) => index))
    expect(entries.filter(({ act }) => act === 'unit-registered').map(({ subject }) => subject.id)).toEqual(units)
    expect(units.length).toBeGreaterThanOrEqual(answered.size)
    expect(file.pragma('integrity_check', { simple: true })).toBe('ok')
    file.close()
  })
})
