import { z } from 'zod'
import { problemSchema } from '#shared/api/common'
import { routes, type RouteDeclaration } from '#shared/api/routes'

type Json = Record<string, unknown>

/** A wire schema as JSON Schema; `io` input for what is sent to us, where defaults and coercion make a difference. */
const schemaOf = (schema: z.ZodType, io: 'input' | 'output') => {
  const { $schema: _dialect, ...json } = z.toJSONSchema(schema, { target: 'draft-2020-12', io, unrepresentable: 'any' })
  return json
}

const fileBody = { content: {
  'application/json': { schema: { type: 'object', description: 'a settings file' } },
  'text/csv': { schema: { type: 'string', description: 'a settings file' } },
  'multipart/form-data': { schema: { type: 'object', required: ['file'], properties: { file: { type: 'string', format: 'binary' } } } },
}, required: true }

const anyFile = { content: {
  'application/octet-stream': { schema: { type: 'string', format: 'binary', description: 'any file' } },
  'multipart/form-data': { schema: { type: 'object', required: ['file'], properties: { file: { type: 'string', format: 'binary' } } } },
}, required: true }

const bodyOf = (body: NonNullable<RouteDeclaration['body']>): Json =>
  body === 'file' ? fileBody : body === 'attachment' ? anyFile : { required: true, content: { 'application/json': { schema: schemaOf(body, 'input') } } }

function parametersOf(schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (schema === undefined) return []
  const { properties = {}, required = [] } = schemaOf(schema, 'output') as { properties?: Json, required?: string[] }
  return Object.entries(properties).map(([name, json]) => ({ name, in: place, required: place === 'path' || required.includes(name), schema: json }))
}

function responsesOf({ answers }: RouteDeclaration): Json {
  const problem = { description: 'A problem (RFC 9457)', content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/problem' } } } }
  const listed = Object.entries(answers).map(([status, answer]) => [status, answer === 'file'
    ? { description: 'The file', content: { '*/*': { schema: { type: 'string', format: 'binary' } } } }
    : status === '204' ? { description: 'Done' } : { description: 'The answer', content: { 'application/json': { schema: schemaOf(answer, 'output') } } }] as const)
  return { ...Object.fromEntries(listed), default: problem }
}

const mayText = ({ may, token, sign }: RouteDeclaration) => [
  typeof may === 'string' ? { 'anyone': 'Anyone may call it.', 'signed-in': 'Anyone signed in may call it.' }[may] : `Roles: ${may.join(', ')}.`,
  token === undefined ? '' : `Also a token with the scope ${token}.`,
  sign === true ? 'Signed: the body carries the password again.' : '',
].filter(text => text !== '').join(' ')

function operationOf(declaration: RouteDeclaration): Json {
  const { body, params, query, may, token, says } = declaration
  return {
    summary: says,
    description: mayText(declaration),
    parameters: [...parametersOf(params, 'path'), ...parametersOf(query, 'query')],
    ...(body === undefined ? {} : { requestBody: bodyOf(body) }),
    responses: responsesOf(declaration),
    security: may === 'anyone' ? [] : [{ session: [] }, ...(token === undefined ? [] : [{ token: [] }])],
  }
}

let made: Json | undefined

/** The table of routes as OpenAPI 3.1, made once a process. */
export function openApi(): Json {
  made ??= {
    openapi: '3.1.0',
    info: { title: 'Witnessmark', version: '1', description: 'Settings of servo axes: kept, compared, judged, restored.' },
    paths: pathsOf(routes),
    components: {
      schemas: { problem: schemaOf(problemSchema, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'witnessmark' }, token: { type: 'http', scheme: 'bearer', description: 'wm_…' } },
    },
  }
  return made
}

function pathsOf(table: Readonly<Record<string, RouteDeclaration>>): Json {
  const paths: Record<string, Json> = {}
  for (const [name, declaration] of Object.entries(table)) {
    const [method = '', address = ''] = name.split(' ')
    const path = address.replaceAll(/:(\w+)/g, '{$1}')
    paths[path] = { ...paths[path], [method.toLowerCase()]: operationOf(declaration) }
  }
  return paths
}
