import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { simpleParser } from 'mailparser'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { LetterOne, LetterPage, LetterState, OwnLetters } from '../../shared/api/letters'
import { openVault } from '../../server/database/client'
import { tellWatchers } from '../../server/services/letters/queue'
import { postActor } from '../../server/services/letters/send'
import { startMailServer, type MailServer } from '../support/mail-server'
import { people, startServer, type ServerOptions, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'

/* The built server sends by itself, over SMTP or into files; between its runs the test writes letters as a service would. */

const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
let server: TestServer
let mail: MailServer
let plant: ServerPlant
let axisId: number
let administrator: string

const start = async (env: ServerOptions['env'] = {}) => {
  server = await startServer({ folder, env })
  administrator = await server.signIn('admin')
}
/** Writes a letter to those who watch, while no server runs. */
function write(swapId: number): void {
  const vault = openVault(folder)
  vault.write(postActor, act => tellWatchers(vault.db, act, 'swap-released', axisId, { swapId, at: act.now, by: 'Runa Haldersen', unitOut: 'A4471', unitIn: 'A5502', knownGood: 3 }))
  vault.close()
}
const list = async () => (await server.call('GET', '/api/letters', { as: administrator })).json as unknown as LetterPage
async function until(state: LetterState): Promise<LetterPage> {
  for (let look = 0; look < 100; look += 1) {
    const page = await list()
    if (page.items[0]?.state === state) return page
    await new Promise((resolve) => { setTimeout(resolve, 100) })
  }
  throw new Error(`The newest letter never was ${state}: ${JSON.stringify(await list())}`)
}

beforeAll(async () => {
  mail = await startMailServer({ login: { user: 'marks', password: 'press/seven' } })
  server = await startServer({ folder, seeded: true })
  plant = await plantOn(server)
  axisId = (await plant.axis('LID-01.Z', 'SN-1')).axisId
})
afterAll(async () => {
  await server?.stop()
  await mail?.close()
  rmSync(folder, { recursive: true, force: true })
})

describe('one’s own letters', () => {
  it('are chosen by each person, and axes are watched', async () => {
    const as = plant.as.auditor
    expect(await server.call('POST', '/api/me/letters', { as, body: { kind: 'swap-unreleased', wanted: false } })).toMatchObject({ status: 200 })
    expect(await server.call('POST', '/api/me/watches', { as, body: { scope: 'axis', scopeId: axisId, watched: true } })).toMatchObject({ status: 200 })
    const own = (await server.call('GET', '/api/me/letters', { as })).json as unknown as OwnLetters
    expect(own.watches).toEqual([{ scope: 'axis', scopeId: axisId, name: 'LID-01.Z' }])
    expect(own.choices.find(({ kind }) => kind === 'swap-unreleased')?.wanted).toBe(false)
    expect(await server.call('POST', '/api/me/letters', { as: plant.as.technician, body: { kind: 'checkpoint', wanted: true } })).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await server.call('POST', '/api/me/watches', { as, body: { scope: 'axis', scopeId: 999, watched: true } })).toMatchObject({ status: 404 })
    expect(await server.call('POST', '/api/me/letters', { as, body: { kind: 'birthday', wanted: true } })).toMatchObject({ status: 422 })
  })
})

describe('the built server', () => {
  it('without SMTP_URL writes each letter into the data folder', async () => {
    await server.stop()
    write(1)
    await start()
    const { items, queue } = await until('sent')
    expect(queue).toEqual({ waiting: 0, waitingSince: null, way: 'folder', publicUrl: false })
    const [name] = readdirSync(join(folder, 'letters'))
    const kept = readFileSync(join(folder, 'letters', name!))
    expect((await simpleParser(kept)).subject).toBe('LID-01.Z: swap released')
    const file = await server.call('GET', `/api/letters/${items[0]?.id}/file`, { as: administrator })
    expect([file.headers.get('content-type'), file.text]).toEqual(['message/rfc822', kept.toString('utf8')])
  })

  it('hands letters to the mail server, with the addresses of PUBLIC_URL', async () => {
    await server.stop()
    write(2)
    await start({ SMTP_URL: mail.url, PUBLIC_URL: 'http://marks.larkfield.example' })
    const { items, queue } = await until('sent')
    expect(queue).toMatchObject({ waiting: 0, way: 'smtp', publicUrl: true })
    const [read] = await mail.read()
    expect(read?.to).toMatchObject({ value: [{ address: people.auditor.email }] })
    expect(read?.text).toContain('http://marks.larkfield.example/swaps/2')
    const one = (await server.call('GET', `/api/letters/${items[0]?.id}`, { as: administrator })).json as unknown as LetterOne
    expect(read?.messageId).toBe(`<${one.messageId}>`)
    expect(read?.text?.trim()).toBe(one.text.trim())
    expect(server.output()).not.toContain('press/seven')
    expect(server.output()).not.toContain('press%2Fseven')
  })

  it('killed while the mail server has the letter and has not answered, keeps it and does not send it at once again', async () => {
    mail.answer = () => new Promise(() => undefined)
    await server.stop()
    write(3)
    await start({ SMTP_URL: mail.url })
    while (mail.taken.length < 2) await new Promise((resolve) => { setTimeout(resolve, 50) })
    await server.stop('SIGKILL')
    mail.answer = null
    await start({ SMTP_URL: mail.url })
    const { items: [letter], queue } = await list()
    expect(letter).toMatchObject({ state: 'queued', attempts: 1 })
    expect(queue).toMatchObject({ waiting: 1, waitingSince: letter?.madeAt })
    expect((await server.call('GET', '/api/health')).json).toMatchObject({ status: 'ok', lettersWaitingSince: letter?.madeAt })
    expect(await server.call('POST', `/api/letters/${letter?.id}/send-again`, { as: administrator })).toMatchObject({ status: 409, json: { code: 'letter-under-way' } })
    expect(mail.taken).toHaveLength(2)
  })

  it('sends a letter again when the administrator says so', async () => {
    const { items: [, second] } = await list()
    expect(await server.call('POST', `/api/letters/${second?.id}/send-again`, { as: administrator })).toMatchObject({ status: 200, json: { state: 'queued' } })
    while (mail.taken.length < 3) await new Promise((resolve) => { setTimeout(resolve, 50) })
    const [first, , again] = await mail.read()
    expect(again?.messageId).toBe(first?.messageId)
  })

  it('ends at once when it is stopped, without a timer that holds it up', async () => {
    const before = Date.now()
    await server.stop()
    expect(Date.now() - before).toBeLessThan(5000)
    await start()
  })
})
