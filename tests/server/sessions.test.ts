import Database from 'better-sqlite3'
import { mkdtempSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { admin, people, startServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await startServer() })
afterAll(async () => { await server.stop() })

const me = (as: string) => server.call('GET', '/api/me', { as })

/** Moves the sessions of the vault back in time from outside: a second handle may write while the server runs. */
function age(milliseconds: number): void {
  const file = new Database(join(server.folder, 'vault.sqlite'))
  for (const row of file.prepare('SELECT id_hash, made_at, seen_at FROM session').all() as { id_hash: string, made_at: string, seen_at: string }[]) {
    const earlier = (at: string) => new Date(Date.parse(at) - milliseconds).toISOString()
    file.prepare('UPDATE session SET made_at = ?, seen_at = ? WHERE id_hash = ?').run(earlier(row.made_at), earlier(row.seen_at), row.id_hash)
  }
  file.close()
}

describe('a session', () => {
  it('holds until sign-out, and its cookie not a moment longer', async () => {
    const cookie = await server.signIn('planner')
    expect((await me(cookie)).json).toMatchObject({ name: people.planner.name, roles: ['planner'] })
    expect((await server.call('POST', '/api/sign-out', { as: cookie })).status).toBe(204)
    const after = await me(cookie)
    expect([after.status, after.json.code]).toEqual([401, 'sign-in-needed'])
  })

  it('expires', async () => {
    const cookie = await server.signIn('planner')
    age(13 * 3_600_000)
    expect((await me(cookie)).status).toBe(401)
  })

  it('on a panel expires after five minutes', async () => {
    const panel = await server.signIn({ email: people.technician.email, password: admin.password, panel: true })
    const desk = await server.signIn('technician')
    age(6 * 60_000)
    expect([(await me(panel)).status, (await me(desk)).status]).toEqual([401, 200])
  })

  it('ends when the role, the password or the person changes', async () => {
    const administrator = await server.signIn('admin')
    const { id } = (await server.call('POST', '/api/people', { as: administrator, body: { name: 'Ada', email: 'ada@larkfield.example', roles: ['planner'], siteIds: [], password: admin.password } })).json as unknown as { id: number }
    const ada = await server.signIn({ email: 'ada@larkfield.example', password: admin.password })
    const change = (body: unknown) => server.call('PATCH', `/api/people/${id}`, { as: administrator, body })
    expect((await server.call('GET', '/api/people/names', { as: ada })).status).toBe(200)
    expect((await change({ rev: 1, roles: ['auditor'] })).status).toBe(200)
    expect((await server.call('GET', '/api/people/names', { as: ada })).status).toBe(403)
    await change({ rev: 2, password: 'orchard ladder in the rain' })
    expect((await me(ada)).status).toBe(401)
  })

  it('cannot be made up: a changed or foreign cookie is nobody', async () => {
    const cookie = await server.signIn('planner')
    const bent = cookie.slice(0, -4) + (cookie.endsWith('AAAA') ? 'BBBB' : 'AAAA')
    for (const as of [bent, 'witnessmark=x', 'other=1']) expect((await me(as)).status).toBe(401)
    for (const as of ['wm_short', `wm_${'A'.repeat(43)}`]) expect((await me(as)).status).toBe(401)
  })

  it('has a cookie that scripts cannot read and other sites do not send', async () => {
    const { headers } = await server.call('POST', '/api/sign-in', { body: { email: admin.email, password: admin.password } })
    const cookie = headers.getSetCookie().at(-1) ?? ''
    expect(cookie).toMatch(/^witnessmark=/)
    for (const part of ['HttpOnly', 'SameSite=Lax', 'Path=/']) expect(cookie).toContain(part)
    expect(cookie).not.toContain('Secure')
  })
})

describe('sign-in', () => {
  it('is held off after ten failures, with the time to wait', async () => {
    const attempt = (password: string) => server.call('POST', '/api/sign-in', { body: { email: people.auditor.email, password } })
    const statuses = []
    for (let index = 0; index < 11; index += 1) statuses.push((await attempt('wrong')).status)
    expect(statuses).toEqual([...Array.from({ length: 10 }, () => 401), 429])
    const held = await attempt(admin.password)
    expect([held.status, held.json.code]).toEqual([429, 'throttled'])
    expect(Number(held.headers.get('retry-after'))).toBeGreaterThan(800)
    expect(Number(held.headers.get('retry-after'))).toBeLessThanOrEqual(900)
  })
})

describe('starting', () => {
  it('keeps the secret, the sessions and the throttle over a restart', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'witnessmark-restart-'))
    const first = await startServer({ folder, seeded: true })
    const cookie = await first.signIn('planner')
    await first.stop('SIGKILL')
    const second = await startServer({ folder })
    expect((await second.call('GET', '/api/me', { as: cookie })).status).toBe(200)
    expect(statSync(join(folder, 'session-secret')).mode & 0o077).toBe(0)
    await second.stop()
    rmSync(folder, { recursive: true })
  })

  it('is refused on a vault in use, with a weak secret, and on an edited file', async () => {
    await expect(startServer({ folder: server.folder })).rejects.toThrow(/Another process has this vault open/)
    await expect(startServer({ env: { NUXT_SESSION_PASSWORD: 'a'.repeat(40) } })).rejects.toThrow(/NUXT_SESSION_PASSWORD is weak/)
    await expect(startServer({ env: { PUBLIC_URL: 'marks.example' } })).rejects.toThrow(/no web address/)
    const folder = mkdtempSync(join(tmpdir(), 'witnessmark-edited-'))
    await (await startServer({ folder })).stop()
    const file = new Database(join(folder, 'vault.sqlite'))
    file.exec('DROP TRIGGER version_no_update')
    file.close()
    await expect(startServer({ folder })).rejects.toThrow(/changed by hand/)
    rmSync(folder, { recursive: true })
  })

  it('prints a set-up address that works once where no administrator is named', async () => {
    const empty = await startServer({ env: { WITNESSMARK_ADMIN_EMAIL: '', WITNESSMARK_ADMIN_PASSWORD: '', PUBLIC_URL: 'https://marks.example' }, seeded: false })
    const token = /https:\/\/marks\.example\/set-up\?token=([\w-]+)/.exec(empty.output())?.[1]
    const body = { token, name: 'Ines Okafor', email: admin.email, password: admin.password, plant: 'Larkfield Preserves' }
    expect((await empty.call('POST', '/api/set-up', { body: { ...body, token: 'guess' } })).json.code).toBe('set-up-token')
    expect((await empty.call('POST', '/api/set-up', { body: { ...body, password: 'too short' } })).json.code).toBe('password-weak')
    const claimed = await empty.call('POST', '/api/set-up', { body })
    expect(claimed.json).toMatchObject({ plant: 'Larkfield Preserves', roles: ['admin'], empty: true })
    expect(claimed.headers.getSetCookie().at(-1)).toContain('Secure')
    expect((await empty.call('POST', '/api/set-up', { body })).json.code).toBe('set-up-done')
    await empty.stop()
  })
})
