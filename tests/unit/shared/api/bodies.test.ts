import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { routes, type RouteDeclaration } from '../../../../shared/api/routes'

/*
 * Laws that whatever goes in has to keep, walked over the whole table: a route added tomorrow is held to them as well.
 */

interface Json {
  readonly type?: string
  readonly properties?: Readonly<Record<string, Json>>
  readonly required?: readonly string[]
  readonly additionalProperties?: boolean | Json
  readonly propertyNames?: Json
  readonly items?: Json
  readonly anyOf?: readonly Json[]
  readonly oneOf?: readonly Json[]
  readonly enum?: readonly unknown[]
  readonly const?: unknown
  readonly pattern?: string
  readonly format?: string
  readonly minLength?: number
  readonly maxLength?: number
  readonly maxItems?: number
  readonly exclusiveMinimum?: number
}
interface Part { readonly at: string, readonly key: string, readonly json: Json }

const declared = Object.entries(routes) as [string, RouteDeclaration][]
const jsonOf = (schema: z.ZodType) => z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Json

/** A schema and every schema inside it, each with the way that leads there. */
function walk(json: Json, at: string, key = ''): Part[] {
  const inside = [
    ...Object.entries(json.properties ?? {}).map(([name, each]) => walk(each, `${at}/${name}`, name)),
    ...[json.items, typeof json.additionalProperties === 'object' ? json.additionalProperties : undefined].map(each => each ? walk(each, `${at}/*`, key) : []),
    ...[...json.anyOf ?? [], ...json.oneOf ?? []].map(each => walk(each, at, key)),
  ]
  return [{ at, key, json }, ...inside.flat()]
}

const sent = declared.flatMap(([name, { body, query, params }]) => [body, query, params].flatMap(schema =>
  schema === undefined || typeof schema === 'string' ? [] : walk(jsonOf(schema), name)))

/** Places of those that break a law; the way of each is told where a test fails. */
const places = (breaks: (part: Part) => boolean) => [...new Set(sent.filter(breaks).map(({ at }) => at))]

describe('everything that goes in', () => {
  it('is walked: bodies, queries and parameters, down to the fields of a list inside them', () => {
    const ways = sent.map(({ at }) => at)
    for (const way of ['POST /api/axes/tag', 'POST /api/axes/duty/moves/*', 'GET /api/units/search', 'GET /api/versions/:id/changes/against', 'PATCH /api/nameplates/:id/dictionary/*/weight', 'POST /api/waivers/value/values/*/place']) {
      expect(ways, way).toContain(way)
    }
  })

  it('is closed at every depth: a key that nobody knows is refused in a list of a body as well', () => {
    expect(places(({ json }) => json.type === 'object' && json.properties !== undefined && json.additionalProperties !== false)).toEqual([])
  })

  it('that has keys of its own choice bounds their length and says what they hold', () => {
    expect(places(({ json }) => json.type === 'object' && json.properties === undefined
      && (json.propertyNames?.maxLength === undefined || json.propertyNames.minLength !== 1 || typeof json.additionalProperties !== 'object'))).toEqual([])
  })

  it('that is a text has a longest length, a choice, or a form that bounds it', () => {
    const bounded = ({ maxLength, enum: choice, const: only, pattern, format }: Json) =>
      maxLength !== undefined || choice !== undefined || only !== undefined || format === 'date-time' || (pattern?.startsWith('^') && /\{\d+,\d+\}\)?\$$/.test(pattern))
    expect(places(({ json }) => json.type === 'string' && !bounded(json))).toEqual([])
  })

  it('that is a list has a greatest length', () => {
    expect(places(({ json }) => json.type === 'array' && json.maxItems === undefined)).toEqual([])
  })

  it('that names a record does so by a whole number above 0, or by the tag of an axis', () => {
    const ids = sent.filter(({ key, json }) => /(^i|I)ds?$/.test(key) && !['array', 'null', undefined].includes(json.type))
    expect(ids.length).toBeGreaterThan(40)
    expect(ids.filter(({ json }) => json.type === 'string' ? !json.pattern?.includes('[1-9]') : json.type !== 'integer' || json.exclusiveMinimum !== 0).map(({ at }) => at)).toEqual([])
  })

  it('that is a time is one with an offset; a text field named like a time is none', () => {
    const times = sent.filter(({ key, json }) => /(^at|At|^until)$/.test(key) && json.type === 'string')
    expect(times.length).toBeGreaterThan(5)
    expect(times.filter(({ at, json }) => json.format !== 'date-time' && !/waivers\/at/.test(at)).map(({ at }) => at)).toEqual([])
  })

  it('of a page is a limit and a cursor together, whatever else can be asked', () => {
    for (const [name, { query, answers }] of declared) {
      const answer = answers[200]
      const paged = answer instanceof z.ZodObject && 'next' in answer.shape
      const asked = query instanceof z.ZodObject ? Object.keys(query.shape) : []
      expect([asked.includes('limit'), asked.includes('cursor')], name).toEqual([paged, paged])
    }
  })

  it('of a query needs no value that an address cannot carry: each is read from text', () => {
    for (const [name, { query, params }] of declared) {
      for (const schema of [query, params]) {
        if (!(schema instanceof z.ZodObject)) continue
        for (const [key, field] of Object.entries(schema.shape)) {
          const json = jsonOf(field as z.ZodType)
          const text = json.type === 'integer' || json.type === 'number' ? '7' : json.format === 'date-time' ? '2026-11-30T08:15:00Z' : String(json.enum?.[0] ?? (key === 'axis' || key === 'id' ? 'tag:LID-02.Z' : 'a'))
          expect((field as z.ZodType).safeParse(text).success, `${name} ?${key}=${text}`).toBe(true)
        }
      }
    }
  })
})

describe('a change', () => {
  const patches = declared.flatMap(([name, { body }]) => name.startsWith('PATCH') && body instanceof z.ZodObject ? [[name, body] as const] : [])

  it('is one of these', () => {
    expect(patches.map(([name]) => name)).toEqual(expect.arrayContaining(['PATCH /api/people/:id', 'PATCH /api/sites/:id', 'PATCH /api/axes/:id', 'PATCH /api/units/:id', 'PATCH /api/nameplates/:id']))
  })

  it.each(patches)('%s needs no field but the rev, which is whole', (_name, body) => {
    expect(jsonOf(body).required ?? []).toEqual([])
    expect(body.safeParse({ rev: 1 }).success).toBe(true)
    for (const rev of [1.5, '1', null]) expect(body.safeParse({ rev }).success, String(rev)).toBe(false)
  })

  it.each(patches)('%s takes null only for what may be absent in its answer (RFC 7396: null removes)', (name, body) => {
    const { answers }: RouteDeclaration = routes[name as keyof typeof routes]
    const answer = answers[200]
    const record = answer instanceof z.ZodObject ? answer.shape : {}
    const mayBeNull = (key: string) => record[key] !== undefined && z.safeParse(record[key] as z.ZodType, null).success
    const takesNull = Object.keys(body.shape).filter(key => body.safeParse({ rev: 1, [key]: null }).success)
    if (name === 'PATCH /api/nameplates/:id') expect(Object.keys(body.shape).filter(key => !takesNull.includes(key))).toEqual(['rev'])
    else expect(takesNull.filter(key => !mayBeNull(key))).toEqual([])
  })

  it.each(patches)('%s refuses each field as the wrong kind of value', (_name, body) => {
    for (const key of Object.keys(body.shape)) expect(body.safeParse({ rev: 1, [key]: { no: 'such' } }).success, key).toBe(false)
  })
})

describe('what has to be there', () => {
  const bodies = declared.flatMap(([name, { body }]) => body instanceof z.ZodObject && !name.startsWith('PATCH') ? [[name, body] as const] : [])

  /** An axis that runs again needs no word; a report of every axis and all time no place. */
  const mayBeEmpty = ['POST /api/swaps/:id/running', 'POST /api/reports']

  it.each(bodies)('%s is refused empty, and as anything but an object', (name, body) => {
    expect(body.safeParse({}).success).toBe(mayBeEmpty.includes(name))
    for (const value of [[], null, 'text', 5, undefined]) expect(body.safeParse(value).success, JSON.stringify(value)).toBe(false)
  })
})
