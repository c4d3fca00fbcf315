import { describe, expect, it } from 'vitest'
import { routes, type RouteDeclaration } from '../../../shared/api/routes'
import { openApi } from '../../../server/services/openapi/openapi'

/*
 * The document of the interface against the rules of OpenAPI 3.1.0 (sections named beside each test) and of JSON Schema
 * draft 2020-12, which its schemas are written in.
 */

type Json = Readonly<Record<string, unknown>>
interface Parameter { readonly name: string, readonly in: string, readonly required: boolean, readonly schema: Json }
interface Operation {
  readonly summary: string
  readonly parameters: readonly Parameter[]
  readonly requestBody?: { readonly required: boolean, readonly content: Readonly<Record<string, { readonly schema: Json }>> }
  readonly responses: Readonly<Record<string, { readonly description: string, readonly content?: Readonly<Record<string, { readonly schema: Json }>> }>>
  readonly security: readonly Readonly<Record<string, readonly string[]>>[]
}
interface Document {
  readonly openapi: string
  readonly info: { readonly title: string, readonly version: string }
  readonly paths: Readonly<Record<string, Readonly<Record<string, Operation>>>>
  readonly components: { readonly schemas: Readonly<Record<string, Json>>, readonly securitySchemes: Readonly<Record<string, Json>> }
}

// As a program gets it: whatever JSON cannot carry is lost on the way.
const document = JSON.parse(JSON.stringify(openApi())) as Document
const operations = Object.entries(document.paths).flatMap(([path, item]) => Object.entries(item).map(([method, operation]) => ({ path, method, operation, name: `${method} ${path}` })))
const isObject = (value: unknown): value is Json => typeof value === 'object' && value !== null && !Array.isArray(value)

describe('the document of the interface', () => {
  it('says by which version it is written, and of what it tells (4.8.1, 4.8.2)', () => {
    expect(document.openapi).toBe('3.1.0')
    expect(document.info).toMatchObject({ title: 'Witnessmark', version: '1' })
    expect(Object.keys(document).sort()).toEqual(['components', 'info', 'openapi', 'paths'])
  })

  it('has an operation for each row of the table, and none besides', () => {
    const told = operations.map(({ path, method }) => `${method.toUpperCase()} ${path.replaceAll(/\{(\w+)\}/g, ':$1')}`)
    expect(told.sort()).toEqual(Object.keys(routes).sort())
  })

  it('has paths that begin with a slash and do not differ by the name of a parameter alone (4.8.8)', () => {
    const paths = Object.keys(document.paths)
    for (const path of paths) expect(path).toMatch(/^\/[\w./{}-]+$/)
    const shapes = paths.map(path => path.replaceAll(/\{\w+\}/g, '{}'))
    expect(new Set(shapes).size).toBe(paths.length)
  })

  it.each(operations.map(each => [each.name, each] as const))('%s: its parameters are those of its path and of its query, each once (4.8.10, 4.8.12)', (_name, { path, operation }) => {
    const inPath = operation.parameters.filter(each => each.in === 'path')
    expect(inPath.map(each => each.name)).toEqual([...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name))
    expect(inPath.every(each => each.required)).toBe(true)
    expect(new Set(operation.parameters.map(each => `${each.in} ${each.name}`)).size).toBe(operation.parameters.length)
    for (const each of operation.parameters) {
      expect(['path', 'query']).toContain(each.in)
      expect(Object.keys(each.schema), each.name).not.toEqual([])
    }
  })

  it.each(operations.map(each => [each.name, each] as const))('%s: its body and its answers have a media type and words (4.8.13, 4.8.16)', (_name, { method, operation }) => {
    if (method === 'get') expect(operation.requestBody).toBeUndefined()
    const bodies = [...operation.requestBody ? [operation.requestBody.content] : [], ...Object.values(operation.responses).flatMap(({ content }) => content ? [content] : [])]
    for (const content of bodies) for (const type of Object.keys(content)) expect(type).toMatch(/^[\w*]+\/[\w*+.-]+$/)
    for (const [status, { description }] of Object.entries(operation.responses)) {
      expect(status).toMatch(/^([1-5]\d\d|default)$/)
      expect(description).toMatch(/\S/)
    }
    expect(Object.keys(operation.responses)).toContain('default')
    expect(Object.keys(operation.responses).some(status => status.startsWith('2'))).toBe(true)
    if (operation.responses[204]) expect(operation.responses[204].content).toBeUndefined()
  })

  it('asks for a sign-in or a token exactly where the table does, by schemes that it explains (4.8.27, 4.8.30)', () => {
    expect(document.components.securitySchemes).toMatchObject({ session: { type: 'apiKey', in: 'cookie', name: 'witnessmark' }, token: { type: 'http', scheme: 'bearer' } })
    for (const { path, method, operation } of operations) {
      const { may, token }: RouteDeclaration = routes[`${method.toUpperCase()} ${path.replaceAll(/\{(\w+)\}/g, ':$1')}` as keyof typeof routes]
      const asked = operation.security.map(each => Object.keys(each).join())
      expect(asked, path).toEqual(may === 'anyone' ? [] : token === undefined ? ['session'] : ['session', 'token'])
    }
  })
})

/** Every schema of the document with its place: those of parameters, bodies, answers, and of the components. */
const schemas = [
  ...operations.flatMap(({ name, operation }) => [
    ...operation.parameters.map(({ name: parameter, schema }) => ({ at: `${name} ?${parameter}`, schema })),
    ...[operation.requestBody, ...Object.values(operation.responses)].flatMap(each => Object.values(each?.content ?? {}).map(({ schema }) => ({ at: name, schema }))),
  ]),
  ...Object.entries(document.components.schemas).map(([at, schema]) => ({ at, schema })),
]

const types = ['null', 'boolean', 'object', 'array', 'number', 'string', 'integer']
const counts = ['minLength', 'maxLength', 'minItems', 'maxItems', 'minProperties', 'maxProperties']
const bounds = ['minimum', 'maximum', 'exclusiveMinimum', 'exclusiveMaximum', 'multipleOf']
const lists = ['anyOf', 'oneOf', 'allOf', 'prefixItems']
const maps = ['properties', '$defs', 'patternProperties']
const ones = ['items', 'additionalProperties', 'propertyNames', 'not', 'contains', 'if', 'then', 'else']
const known = new Set([...counts, ...bounds, ...lists, ...maps, ...ones, 'type', 'enum', 'const', 'required', 'pattern', 'format', 'description', 'title', 'default', 'examples', '$ref', '$id', 'id', 'contentEncoding'])

/** What breaks the rules of draft 2020-12 in a schema, with the way to it. */
function faults(schema: unknown, at: string): string[] {
  if (typeof schema === 'boolean') return []
  if (!isObject(schema)) return [`${at} is no schema`]
  const wrong = (found: boolean, what: string) => found ? [`${at} ${what}`] : []
  const { type, enum: choice, required, pattern } = schema
  const ref = schema.$ref
  return [
    ...Object.keys(schema).filter(key => !known.has(key)).map(key => `${at} has ${key}, which the draft does not know`),
    ...wrong(type !== undefined && ![type].flat().every(each => types.includes(each as string)), `type ${JSON.stringify(type)}`),
    ...wrong(choice !== undefined && (!Array.isArray(choice) || new Set(choice).size !== choice.length || choice.length === 0), 'enum'),
    ...wrong(required !== undefined && (!Array.isArray(required) || required.some(each => !isObject(schema.properties) || !(each as string in schema.properties))), `requires ${JSON.stringify(required)}`),
    ...wrong(typeof pattern === 'string' && !compiles(pattern), 'pattern'),
    ...wrong(ref !== undefined && resolved(ref as string) === undefined, `leads to ${JSON.stringify(ref)}`),
    ...counts.flatMap(key => wrong(key in schema && !(Number.isInteger(schema[key]) && schema[key] as number >= 0), key)),
    ...bounds.flatMap(key => wrong(key in schema && typeof schema[key] !== 'number', key)),
    ...lists.flatMap(key => key in schema ? Array.isArray(schema[key]) && schema[key].length > 0 ? schema[key].flatMap((each, index) => faults(each, `${at}/${key}/${index}`)) : [`${at} ${key}`] : []),
    ...maps.flatMap(key => key in schema ? isObject(schema[key]) ? Object.entries(schema[key]).flatMap(([name, each]) => faults(each, `${at}/${key}/${name}`)) : [`${at} ${key}`] : []),
    ...ones.flatMap(key => key in schema ? faults(schema[key], `${at}/${key}`) : []),
  ]
}

function compiles(pattern: string): boolean {
  try {
    return new RegExp(pattern, 'u') instanceof RegExp
  }
  catch {
    return false
  }
}

function resolved(ref: string): unknown {
  return ref.startsWith('#/') ? ref.slice(2).split('/').reduce<unknown>((place, key) => isObject(place) ? place[key.replaceAll('~1', '/').replaceAll('~0', '~')] : undefined, document) : undefined
}

describe('the schemas of the document', () => {
  it('keep the rules of draft 2020-12, every one of them', () => {
    expect(schemas.length).toBeGreaterThan(150)
    expect(schemas.flatMap(({ at, schema }) => faults(schema, at))).toEqual([])
  })

  it('are looked at by rules that find something', () => {
    expect(faults({ type: 'text' }, 'a')).toHaveLength(1)
    expect(faults({ type: 'string', nullable: true }, 'a')).toHaveLength(1)
    expect(faults({ type: 'object', properties: { b: { minLength: -1 } }, required: ['c'] }, 'a')).toHaveLength(2)
    expect(faults({ anyOf: [{ $ref: '#/components/schemas/nothing' }, { pattern: '(' }] }, 'a')).toHaveLength(2)
    expect(faults({ minimum: true, enum: [] }, 'a')).toHaveLength(2)
    expect(faults({ $ref: '#/components/schemas/problem' }, 'a')).toEqual([])
  })

  it('tell a program that a body is closed, and a reader what the answer of an error holds', () => {
    for (const { name, operation } of operations) {
      const schema = operation.requestBody?.content['application/json']?.schema
      if (schema?.properties) expect(schema.additionalProperties, name).toBe(false)
    }
    expect(document.components.schemas.problem).toMatchObject({ properties: { type: {}, title: {}, status: {}, detail: {}, code: {} } })
  })
})
