import { createServer, request, type Server } from 'node:http'
import { connect, type AddressInfo } from 'node:net'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { CodedError } from '#shared/errors/coded'
import { cleanName, fileLimit, readFileBody } from '../../../server/http/file-body'

interface Answer { code?: string, message?: string, bytes?: number, text?: string, name?: string | null, fields?: Record<string, string>, digest?: string }

let server: Server
let port: number
let lastCode: Promise<string>

beforeAll(async () => {
  let told: (code: string) => void = () => undefined
  lastCode = new Promise((resolve) => { told = resolve })
  server = createServer((incoming, outgoing) => {
    readFileBody(incoming).then(
      body => outgoing.end(JSON.stringify({ bytes: body.bytes.length, text: body.bytes.subarray(0, 40).toString('utf8'), name: body.name, fields: body.fields, digest: body.digest })),
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
afterAll(() => new Promise<void>((resolve) => { server.close(() => resolve()) }))

function send(headers: Record<string, string>, chunks: readonly (string | Buffer)[], length?: number): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const outgoing = request({ port, host: '127.0.0.1', method: 'POST', headers: { ...headers, ...(length === undefined ? {} : { 'content-length': String(length) }) } }, (incoming) => {
      const parts: Buffer[] = []
      incoming.on('data', (part: Buffer) => parts.push(part))
      incoming.on('end', () => resolve(JSON.parse(Buffer.concat(parts).toString('utf8')) as Answer))
    })
    outgoing.on('error', reject)
    for (const chunk of chunks) outgoing.write(chunk)
    outgoing.end()
  })
}

const json = { 'content-type': 'application/json' }
const formOf = (boundary: string, parts: readonly string[]) => parts.map(part => `--${boundary}\r\n${part}\r\n`).join('') + `--${boundary}--\r\n`
const filePart = (content: string, name = 'lid.json') => `Content-Disposition: form-data; name="file"; filename="${name}"\r\nContent-Type: application/json\r\n\r\n${content}`
const fieldPart = (name: string, value: string) => `Content-Disposition: form-data; name="${name}"\r\n\r\n${value}`
const form = (parts: readonly string[], boundary = 'XyZ') => send({ 'content-type': `multipart/form-data; boundary=${boundary}` }, [formOf(boundary, parts)])

describe('a raw body', () => {
  it('comes through byte for byte, with or without a Content-Length', async () => {
    expect(await send(json, ['{"a":', '1}'])).toMatchObject({ bytes: 7, text: '{"a":1}', name: null, fields: {} })
    expect(await send({ 'content-type': 'text/csv; charset=utf-8' }, ['section'], 7)).toMatchObject({ bytes: 7 })
  })

  it('of exactly 2 MiB is taken, one byte more is refused, chunked without a length too', async () => {
    const half = Buffer.alloc(fileLimit / 2, 0x20)
    expect(await send(json, [half, half])).toMatchObject({ bytes: fileLimit })
    const answer = await send(json, [half, half, 'x'])
    expect(answer.code).toBe('too-large')
    expect(answer.message).toContain('2,097,152')
    expect(await send(json, [half, half, 'x'], fileLimit + 1)).toMatchObject({ code: 'too-large' })
  })

  it('of 48 MiB in chunks is refused with little memory', async () => {
    const before = process.memoryUsage().arrayBuffers
    const megabyte = Buffer.alloc(1024 * 1024)
    const answer = await send(json, Array.from({ length: 48 }, () => megabyte))
    expect(answer.code).toBe('too-large')
    expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(32 * 1024 * 1024)
  })

  it('of another content type, or packed, is refused and the type named', async () => {
    const answer = await send({ 'content-type': 'application/zip' }, ['PK'])
    expect(answer.code).toBe('content-type')
    expect(answer.message).toContain('application/zip')
    expect(await send({}, ['{}'])).toMatchObject({ code: 'content-type' })
    expect(await send({ ...json, 'content-encoding': 'gzip' }, ['{}'])).toMatchObject({ code: 'content-type' })
  })

  it('that ends before its length has come is told apart', async () => {
    const socket = connect(port, '127.0.0.1', () => {
      socket.write('POST / HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\nContent-Length: 100\r\n\r\n{"half":')
      setTimeout(() => socket.destroy(), 50)
    })
    expect(await lastCode).toBe('body-cut')
  })
})

describe('a form', () => {
  it('gives file, name and fields', async () => {
    const answer = await form([fieldPart('occasion', 'as-found'), filePart('{"ä":1}', 'Deckel ä.json'), fieldPart('reason', 'belt changed')])
    expect(answer).toMatchObject({ text: '{"ä":1}', name: 'Deckel ä.json', fields: { occasion: 'as-found', reason: 'belt changed' } })
  })

  it('keeps the whole of a file of 2 MiB and refuses one byte more', async () => {
    expect(await form([filePart('x'.repeat(fileLimit))])).toMatchObject({ bytes: fileLimit })
    expect(await form([filePart('x'.repeat(fileLimit + 1))])).toMatchObject({ code: 'too-large' })
  })

  it('has the same digest under another boundary and another order of fields, another with another byte', async () => {
    const first = await form([fieldPart('a', '1'), fieldPart('b', '2'), filePart('{}')])
    expect((await form([fieldPart('b', '2'), fieldPart('a', '1'), filePart('{}')], 'QQ')).digest).toBe(first.digest)
    expect((await form([fieldPart('a', '1'), fieldPart('b', '3'), filePart('{}')])).digest).not.toBe(first.digest)
    expect((await form([fieldPart('a', '1'), fieldPart('b', '2'), filePart('{ }')])).digest).not.toBe(first.digest)
  })

  it.each([
    ['file-missing', [fieldPart('occasion', 'routine')]],
    ['file-missing', [fieldPart('file', '{}')]],
    ['file-twice', [filePart('{}'), filePart('{}')]],
    ['field-twice', [fieldPart('a', '1'), fieldPart('a', '2'), filePart('{}')]],
    ['field-too-large', [fieldPart('a', 'x'.repeat(9000)), filePart('{}')]],
    ['multipart-broken', [filePart('{}').replace('name="file"', 'name="upload"')]],
    ['multipart-broken', Array.from({ length: 18 }, (_, index) => fieldPart(`f${index}`, '1'))],
  ])('is refused as %s', async (code, parts) => {
    expect(await form(parts)).toMatchObject({ code })
  })

  it('that is cut, or names no boundary, is refused with words', async () => {
    const whole = formOf('XyZ', [filePart('{"a":1}')])
    const cut = await send({ 'content-type': 'multipart/form-data; boundary=XyZ' }, [whole.slice(0, -12)])
    expect(cut.code).toBe('multipart-broken')
    expect(cut.message).toContain('Send it again')
    expect(await send({ 'content-type': 'multipart/form-data' }, [whole])).toMatchObject({ code: 'multipart-broken' })
  })

  it('never hands on a name with direction characters', async () => {
    expect((await form([filePart('{}', 'a\u202eb\u2066c.json')])).name).toBe('abc.json')
  })
})

describe('a file name', () => {
  it('loses folders and what must not be shown, and is cut between characters', () => {
    expect(cleanName('C:\\drives\\lid 2.json')).toBe('lid 2.json')
    expect(cleanName('../../etc/lid.csv')).toBe('lid.csv')
    expect(cleanName('a\r\nb\u0000.json')).toBe('ab.json')
    expect(cleanName('\u{1f529}'.repeat(300))).toBe('\u{1f529}'.repeat(255))
    expect([cleanName(''), cleanName(null), cleanName('drives/')]).toEqual([null, null, null])
  })
})
