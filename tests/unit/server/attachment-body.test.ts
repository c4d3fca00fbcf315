import { createHash } from 'node:crypto'
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { createServer, request, type Server } from 'node:http'
import { connect, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { attachmentLimit } from '../../../shared/api/attachments'
import { CodedError } from '../../../shared/errors/coded'
import { clearIncoming, incomingFolder, withAttachment } from '../../../server/http/attachment-body'

interface Answer { code?: string, message?: string, size?: number, sha256?: string, read?: string, name?: string | null, mediaType?: string, fields?: Record<string, string>, digest?: string }

const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
let server: Server
let port: number
let cut: Promise<string>

beforeAll(async () => {
  let told: (code: string) => void = () => undefined
  cut = new Promise((resolve) => { told = resolve })
  server = createServer((incoming, outgoing) => {
    withAttachment(incoming, folder, {}, ({ path, ...body }) => ({ ...body, read: createHash('sha256').update(readFileSync(path)).digest('hex') })).then(
      body => outgoing.end(JSON.stringify(body)),
      (error: unknown) => {
        const code = error instanceof CodedError ? error.code : String(error)
        if (code === 'body-cut') told(code)
        outgoing.end(JSON.stringify({ code, message: error instanceof Error ? error.message : '' }))
      },
    )
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  port = (server.address() as AddressInfo).port
})
afterAll(async () => {
  await new Promise<void>((resolve) => { server.close(() => resolve()) })
  rmSync(folder, { recursive: true })
})

function send(headers: Record<string, string>, chunks: readonly (string | Buffer)[]): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const outgoing = request({ port, host: '127.0.0.1', method: 'POST', headers }, (incoming) => {
      const parts: Buffer[] = []
      incoming.on('data', (part: Buffer) => parts.push(part))
      incoming.on('end', () => resolve(JSON.parse(Buffer.concat(parts).toString('utf8')) as Answer))
    })
    outgoing.on('error', reject)
    for (const chunk of chunks) outgoing.write(chunk)
    outgoing.end()
  })
}

const left = () => (existsSync(incomingFolder(folder)) ? readdirSync(incomingFolder(folder)) : [])
const raw = { 'content-type': 'application/x-drive' }
const half = Buffer.alloc(attachmentLimit / 2, 0x41)
const head = (name: string, more = '') => `--XyZ\r\nContent-Disposition: form-data; name="${name}"${more}\r\n\r\n`
const file = (content: string, name = 'file') => `${head(name, '; filename="lid.drv"')}${content}\r\n`
const form = (...parts: string[]) => send({ 'content-type': 'multipart/form-data; boundary=XyZ' }, [...parts, '--XyZ--\r\n'])

describe('a raw attachment', () => {
  it('is put aside byte for byte, hashed, and gone afterwards', async () => {
    const answer = await send(raw, ['abc', 'def'])
    const hash = createHash('sha256').update('abcdef').digest('hex')
    expect(answer).toMatchObject({ size: 6, sha256: hash, read: hash, name: null, mediaType: 'application/x-drive' })
    expect(left()).toEqual([])
  })

  it('of exactly 20 MiB is taken, one byte more is refused and leaves nothing behind', async () => {
    expect(await send(raw, [half, half])).toMatchObject({ size: attachmentLimit })
    expect(await send(raw, [half, half, 'x'])).toMatchObject({ code: 'too-large', message: expect.stringContaining('20 MiB') as string })
    expect(left()).toEqual([])
  })

  it('is refused where it is empty, or compressed on the way', async () => {
    expect((await send(raw, [])).code).toBe('file-missing')
    expect((await send({ ...raw, 'content-encoding': 'gzip' }, ['x'])).code).toBe('content-type')
  })

  it('that breaks off is told apart from a whole one, and leaves nothing behind', async () => {
    const socket = connect(port, '127.0.0.1')
    await new Promise<void>(resolve => socket.once('connect', () => resolve()))
    socket.write(`POST / HTTP/1.1\r\nHost: x\r\nContent-Type: application/x-drive\r\nContent-Length: 1000\r\n\r\n${'y'.repeat(400)}`)
    await new Promise(resolve => setTimeout(resolve, 50))
    socket.destroy()
    expect(await cut).toBe('body-cut')
    await expect.poll(left).toEqual([])
  })
})

describe('a form', () => {
  it('gives name and fields beside the file, in any order', async () => {
    for (const parts of [[file('abc'), `${head('kind')}photo\r\n`], [`${head('kind')}photo\r\n`, file('abc')]]) {
      expect(await form(...parts)).toMatchObject({ size: 3, name: 'lid.drv', fields: { kind: 'photo' }, sha256: createHash('sha256').update('abc').digest('hex') })
    }
  })

  it('has the same digest with another boundary, and another with other fields', async () => {
    const other = await send({ 'content-type': 'multipart/form-data; boundary=AbC' }, [file('abc').replace('--XyZ', '--AbC'), '--AbC--\r\n'])
    expect((await form(file('abc'))).digest).toBe(other.digest)
    expect((await form(file('abc'), `${head('note')}n\r\n`)).digest).not.toBe(other.digest)
  })

  it.each([
    ['no file', [`${head('kind')}photo\r\n`], 'file-missing'],
    ['two files', [file('a'), file('b')], 'file-twice'],
    ['a file under another name', [file('a', 'attachment')], 'multipart-broken'],
    ['a field twice', [file('a'), `${head('note')}x\r\n`, `${head('note')}y\r\n`], 'field-twice'],
    ['a kind that is none', [file('a'), `${head('kind')}song\r\n`], 'input'],
    ['a field that is none', [file('a'), `${head('colour')}red\r\n`], 'input'],
    ['a field too long', [file('a'), `${head('note')}${'n'.repeat(9000)}\r\n`], 'field-too-large'],
    ['an empty file', [file('')], 'file-missing'],
  ])('with %s is refused', async (_what, parts, code) => {
    expect((await form(...parts)).code).toBe(code)
    expect(left()).toEqual([])
  })

  it('that ends in the middle, or has no boundary, is refused', async () => {
    expect((await send({ 'content-type': 'multipart/form-data; boundary=XyZ' }, [file('abc')])).code).toBe('multipart-broken')
    expect((await send({ 'content-type': 'multipart/form-data' }, ['x'])).code).toBe('multipart-broken')
    expect(left()).toEqual([])
  })

  it('of 20 MiB and one byte is refused', async () => {
    const answer = await send({ 'content-type': 'multipart/form-data; boundary=XyZ' }, [head('file', '; filename="lid.drv"'), half, half, 'x\r\n--XyZ--\r\n'])
    expect(answer.code).toBe('too-large')
    expect(left()).toEqual([])
  })
})

describe('what a killed process left', () => {
  it('is taken away at the start', () => {
    writeFileSync(join(incomingFolder(folder), 'half'), 'half')
    clearIncoming(folder)
    expect(left()).toEqual([])
  })
})
