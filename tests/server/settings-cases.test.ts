import { readFileSync } from 'node:fs'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { FormatError } from '../../shared/settings/types'
import { readSettings } from '../../shared/settings/read'
import { startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'

interface Case {
  readonly file: string
  readonly form: 'json' | 'csv'
  readonly what: string
  readonly decimal?: 'point' | 'comma'
  readonly errors?: readonly Pick<FormatError, 'code' | 'at' | 'line' | 'column'>[]
  readonly more?: number
  readonly contentHash?: string
  readonly scribeCode?: string
  readonly normalised?: object
}

const fixture = (name: string) => readFileSync(new URL(`../../fixtures/settings/${name}`, import.meta.url))
const cases = JSON.parse(fixture('cases.json').toString('utf8')) as Case[]
const typeOf = ({ form }: Case) => (form === 'json' ? 'application/json' : 'text/csv')
const queryOf = ({ decimal }: Case, rest = '') => `?decimal=${decimal ?? ''}${rest}`

let server: TestServer
let plant: ServerPlant

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
})
afterAll(() => server.stop())

describe('a file that is wrong in one way', () => {
  it.each(cases.filter(({ errors }) => errors).map(each => [each.file, each.what, each] as const))('%s: %s', async (name, _what, each) => {
    const bytes = fixture(name)
    const before = plant.rows()
    const { status, json, headers } = await plant.upload(bytes, queryOf(each), { type: typeOf(each) })
    expect(status).toBe(422)
    expect(headers.get('content-type')).toBe('application/problem+json')
    const problem = json as unknown as { code: string, errors: FormatError[], more?: number, tray: number }
    expect(problem.code).toBe('settings-unreadable')
    expect(problem.errors).toMatchObject(each.errors ?? [])
    expect(problem.more ?? 0).toBe(each.more ?? 0)
    for (const { message } of problem.errors) expect(message).toMatch(/\S{2,}.* \S{2,}/)
    expect(plant.rows()).toEqual({ ...before, upload: (before.upload ?? 0) + 1, tray: (before.tray ?? 0) + 1, log: (before.log ?? 0) + 2 })
    const kept = await fetch(`${server.url}/api/tray/${problem.tray}/file`, { headers: { cookie: plant.as.technician } })
    expect(Buffer.from(await kept.arrayBuffer()).equals(bytes)).toBe(true)
  })
})

const readable = cases.filter(({ errors }) => !errors).map((each) => {
  const read = readSettings(fixture(each.file), each.decimal === undefined ? {} : { decimal: each.decimal })
  if (!read.ok) throw new Error(`${each.file}: ${JSON.stringify(read.errors)}`)
  return { each, ...read.value }
})

// The cases share serials, and a unit sits at one kind of axis: a vault for each kind.
describe.each(['linear', 'rotary'] as const)('a %s file that can be read', (kind) => {
  let own: TestServer
  let at: ServerPlant
  const fitted = new Set<string>()

  beforeAll(async () => {
    own = await startServer()
    at = await plantOn(own)
  })
  afterAll(() => own.stop())

  it.each(readable.filter(({ file }) => file.axisKind === kind).map(each => [each.each.file, each.each.what, each] as const))('%s: %s', async (name, _what, { each, file: { unit }, content }) => {
    const bytes = fixture(name)
    const key = `${unit.serial.toLowerCase()} ${unit.channel ?? ''}`
    if (!fitted.has(key)) await at.axis(`CASE-${fitted.size + 1}`, unit.serial, { kind, model: unit.model, ...(unit.channel === undefined ? {} : { channel: unit.channel }) })
    fitted.add(key)
    const { status, json, text } = await at.upload(bytes, queryOf(each, '&occasion=as-found'), { type: typeOf(each) })
    expect(status, text).toBe(201)
    expect(json).toMatchObject({ version: { contentHash: each.contentHash, scribeCode: each.scribeCode }, normalised: each.normalised })
    const { id } = (json as unknown as { version: { id: number } }).version
    const handOut = async (form: string) => Buffer.from(await (await fetch(`${own.url}/api/versions/${id}/file?form=${form}`, { headers: { cookie: at.as.auditor } })).arrayBuffer())
    expect((await handOut('original')).equals(bytes)).toBe(true)
    for (const form of ['json', 'csv']) {
      const again = readSettings(await handOut(form))
      expect(again.ok && again.value.content).toEqual(content)
    }
  })
})
