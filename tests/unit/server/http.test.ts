import { Readable } from 'node:stream'
import type { IncomingMessage } from 'node:http'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { CodedError } from '../../../shared/errors/coded'
import { Refusal, refusalCodes } from '../../../shared/errors/refusal'
import { routes } from '../../../shared/api/routes'
import { routeFaults } from '../../../modules/route-table'
import { codedOf, isRefusal, problemOf } from '../../../server/http/errors'
import { checked, queryOf } from '../../../server/http/input'
import { jsonLimit, readJsonBody } from '../../../server/http/json-body'
import { assertOrigin } from '../../../server/http/origin'
import { openApi } from '../../../server/services/openapi/openapi'
import { codeOf, codeOfAsync } from '../../support/codes'

describe('where a request came from', () => {
  const sent = (headers: Record<string, string>, method = 'POST', publicOrigin: string | null = 'https://marks.example') =>
    () => assertOrigin({ method, headers: { host: '10.0.0.4:3000', ...headers } }, publicOrigin)

  it.each([
    [{ 'sec-fetch-site': 'cross-site' }], [{ 'sec-fetch-site': 'same-site' }], [{ origin: 'https://evil.example' }], [{ origin: 'null' }], [{ origin: 'https://marks.example:8443' }],
    [{ 'sec-fetch-site': 'cross-site', 'origin': 'https://marks.example' }], [{ origin: 'http://10.0.0.4:3000' }],
  ])('refuses an unsafe one with %j', headers => expect(codeOf(sent(headers))).toBe('origin'))
  it.each([
    [{ 'sec-fetch-site': 'same-origin' }], [{ 'sec-fetch-site': 'none' }], [{ origin: 'https://marks.example' }], [{}],
    [{ 'sec-fetch-site': 'cross-site', 'authorization': 'Bearer wm_x' }],
  ])('lets an unsafe one with %j through', headers => expect(sent(headers)).not.toThrow())

  it('lets every safe one through: they change nothing', () => {
    for (const method of ['GET', 'HEAD', 'OPTIONS']) expect(sent({ 'sec-fetch-site': 'cross-site' }, method)).not.toThrow()
    for (const method of ['POST', 'PUT', 'PATCH', 'DELETE']) expect(codeOf(sent({ 'sec-fetch-site': 'cross-site' }, method))).toBe('origin')
  })

  it('goes by the host where no public address is set', () => {
    expect(sent({ origin: 'http://10.0.0.4:3000' }, 'POST', null)).not.toThrow()
    expect(codeOf(sent({ origin: 'http://10.0.0.5:3000' }, 'POST', null))).toBe('origin')
    expect(codeOf(sent({ origin: 'null' }, 'POST', null))).toBe('origin')
  })
})

describe('a JSON body', () => {
  const request = (body: string | Buffer, type = 'application/json') =>
    Object.assign(Readable.from([typeof body === 'string' ? Buffer.from(body) : body]), { headers: { 'content-type': type } }) as unknown as IncomingMessage
  const code = (body: string | Buffer, type?: string) => codeOfAsync(() => readJsonBody(request(body, type)))

  it('is read whole', async () => expect(await readJsonBody(request('{"a":[1,"ü"]}', 'Application/JSON; charset=utf-8'))).toEqual({ text: '{"a":[1,"ü"]}', value: { a: [1, 'ü'] } }))
  it('in another form is refused', async () => expect([await code('a=1', 'application/x-www-form-urlencoded'), await code('{}', 'text/plain'), await code('{}', '')]).toEqual(['media-type', 'media-type', 'media-type']))
  it('that is no JSON, no UTF-8 or no text is refused', async () => {
    expect(await code('{"a":')).toBe('json-syntax')
    expect(await code('')).toBe('json-syntax')
    expect(await code(Buffer.from([0x22, 0xff, 0x22]))).toBe('json-syntax')
    expect(await code('{"a":"\\ud800"}')).toBe('input')
  })
  it('is counted as it comes, whatever its length says', async () => {
    expect(await code(`"${'x'.repeat(jsonLimit - 1)}"`)).toBe('too-large')
    expect((await readJsonBody(request(`"${'x'.repeat(jsonLimit - 2)}"`))).text).toHaveLength(jsonLimit)
  })
})

describe('input', () => {
  const errorsOf = (run: () => unknown) => {
    try {
      run()
    }
    catch (error) {
      return (error as Refusal).details
    }
    throw new Error('It threw nothing.')
  }
  const schema = z.strictObject({ name: z.string(), list: z.array(z.strictObject({ 'a/b~c': z.number() })).optional() })

  it('names every place at once', () => {
    expect(errorsOf(() => checked(schema, { list: [{ 'a/b~c': 'x' }], extra: 1, more: 2 }, 'body'))).toMatchObject({
      errors: [{ at: '/name' }, { at: '/list/0/a~1b~0c' }, { at: '/extra', code: 'unrecognized-keys' }, { at: '/more', code: 'unrecognized-keys' }], more: 0,
    })
    expect(errorsOf(() => checked(z.strictObject({ limit: z.coerce.number() }), { limit: 'x' }, 'query'))).toMatchObject({ errors: [{ at: '?limit' }] })
  })

  it('lists a hundred and counts the rest', () => {
    const details = errorsOf(() => checked(z.array(z.number()), Array.from({ length: 130 }, () => 'x'), 'body'))
    expect([(details.errors as unknown[]).length, details.more]).toEqual([100, 30])
  })

  it('of a query: an empty value is none, one given twice is refused', () => {
    expect(queryOf('/api/lines?siteId=4&cursor=&name=a+b%20c')).toEqual({ siteId: '4', name: 'a b c' })
    expect(queryOf('/api/lines')).toEqual({})
    expect(codeOf(() => queryOf('/api/lines?a=1&a=2'))).toBe('input')
  })
})

describe('problems', () => {
  it('have a status for every refusal, and only 4xx and 507 but for a fault', () => {
    for (const code of refusalCodes) {
      const { status } = problemOf(new Refusal(code, 'm'))
      expect(isRefusal(new Refusal(code, 'm')), code).toBe(true)
      if (code === 'fault') expect(status).toBe(500)
      else expect((status >= 400 && status < 500) || status === 507, `${code} is ${status}`).toBe(true)
    }
  })

  it('say nothing of the inside of a fault', () => {
    for (const error of [new TypeError('secret path /var/x'), new CodedError('entry-unreadable', 'secret'), 'secret', null, { code: 7 }]) {
      const problem = problemOf(codedOf(error))
      expect(problem).toMatchObject({ status: 500, code: 'fault' })
      expect(JSON.stringify(problem)).not.toContain('secret')
    }
  })

  it('tell that the disk is full', () => {
    for (const code of ['SQLITE_FULL', 'ENOSPC']) expect(problemOf(codedOf(Object.assign(new Error('x'), { code })))).toMatchObject({ status: 507, code: 'disk-full' })
  })

  it('carry places, what is current and the tray, and no other detail', () => {
    const problem = problemOf(new Refusal('edited-meanwhile', 'm', { current: { rev: 2 }, tray: 4, more: 1, errors: [], hash: 'h' }))
    expect(problem).toEqual({ type: 'urn:witnessmark:problem:edited-meanwhile', title: 'Edited meanwhile', status: 409, detail: 'm', code: 'edited-meanwhile', current: { rev: 2 }, tray: 4, more: 1, errors: [] })
  })
})

describe('the table and the handlers', () => {
  const table = ['GET /api/a', 'POST /api/a/:id/b']
  const fine = [{ route: '/api/a', method: 'get' }, { route: '/api/a/:id/b', method: 'post' }, { route: '/api/**' }, { middleware: true, route: '' }, { route: '/**' }]
  it('agree', () => expect(routeFaults(fine, table)).toEqual([]))
  it('disagree over a handler too many, a module’s too, and over one for every method', () => {
    expect(routeFaults([...fine, { route: '/api/_auth/session', method: 'get' }, { route: '/api/a' }], table)).toEqual(['  GET /api/_auth/session has a handler and is not in the table', '  ANY /api/a has a handler and is not in the table'])
  })
  it('disagree over a handler too few', () => expect(routeFaults(fine.slice(1), table)).toEqual(['  GET /api/a is in the table and has no handler']))
})

describe('the OpenAPI page', () => {
  const { openapi, paths } = openApi() as { openapi: string, paths: Record<string, Record<string, { parameters: { name: string, in: string, required: boolean }[], requestBody?: unknown, responses: Record<string, unknown>, security: unknown[] }>> }

  it('has every route of the table, with its parameters and answers', () => {
    expect(openapi).toBe('3.1.0')
    const listed = Object.entries(paths).flatMap(([path, methods]) => Object.keys(methods).map(method => `${method.toUpperCase()} ${path.replaceAll(/\{(\w+)\}/g, ':$1')}`))
    expect(listed.sort()).toEqual(Object.keys(routes).sort())
    for (const [path, methods] of Object.entries(paths)) {
      for (const operation of Object.values(methods)) {
        const named = operation.parameters.filter(each => each.in === 'path')
        expect(named.map(({ name }) => name).sort()).toEqual([...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name).sort())
        expect(named.every(({ required }) => required)).toBe(true)
        expect(Object.keys(operation.responses)).toContain('default')
      }
    }
  })

  it('says what a body holds and who may call', () => {
    expect(paths['/api/sites']?.post?.requestBody).toMatchObject({ content: { 'application/json': { schema: { type: 'object', required: ['name', 'timeZone'], additionalProperties: false } } } })
    expect(paths['/api/health']?.get?.security).toEqual([])
    expect(paths['/api/uploads']?.post?.security).toEqual([{ session: [] }, { token: [] }])
  })
})
