import { z } from 'zod'
import type { RouteDeclaration } from '#shared/api/routes'

/** One call of the interface, in words. */
export interface RouteLine {
  readonly name: string
  readonly method: string
  readonly path: string
  readonly says: string
  readonly may: string
  readonly token: string
  readonly signs: boolean
  /** Names in the path, the query and the body, the needed ones marked. */
  readonly inputs: readonly { readonly where: 'path' | 'query' | 'body', readonly name: string, readonly kind: string, readonly needed: boolean, readonly says: string }[]
  readonly answers: readonly { readonly status: string, readonly what: string }[]
}

interface Node { readonly type?: string | readonly string[], readonly description?: string, readonly enum?: readonly unknown[], readonly const?: unknown, readonly items?: Node, readonly anyOf?: readonly Node[], readonly properties?: Readonly<Record<string, Node>>, readonly required?: readonly string[], readonly pattern?: string, readonly format?: string }

const asNode = (schema: z.ZodType) => z.toJSONSchema(schema, { unrepresentable: 'any', io: 'input' }) as Node

/** A shape in a few words: text, number, list of numbers, one of a, b. */
export function kindWords(node: Node): string {
  if (node.enum) return `one of ${node.enum.map(String).join(', ')}`
  if (node.const !== undefined) return String(node.const)
  if (node.anyOf) return [...new Set(node.anyOf.map(kindWords))].join(' or ')
  if (node.type === 'array') return `list of ${node.items ? kindWords(node.items) : 'anything'}`
  if (node.format === 'date-time') return 'time, RFC 3339'
  const words: Readonly<Record<string, string>> = { string: 'text', number: 'number', integer: 'whole number', boolean: 'true or false', null: 'null', object: 'object' }
  return typeof node.type === 'string' ? words[node.type] ?? node.type : 'anything'
}

function inputsOf(where: 'path' | 'query' | 'body', schema: z.ZodType | undefined): RouteLine['inputs'] {
  if (!schema) return []
  const node = asNode(schema)
  return Object.entries(node.properties ?? {}).map(([name, part]) => ({ where, name, kind: kindWords(part), needed: node.required?.includes(name) ?? false, says: part.description ?? '' }))
}

function answerWords(schema: z.ZodType | 'file'): string {
  if (schema === 'file') return 'a file'
  const names = Object.keys(asNode(schema).properties ?? {})
  return names.length > 0 ? names.join(', ') : 'nothing'
}

const mayWords = (may: RouteDeclaration['may']): string => may === 'anyone' ? 'anyone' : may === 'signed-in' ? 'whoever is signed in' : may.join(', ')

const fileInput = (body: 'file' | 'attachment') =>
  ({ where: 'body' as const, name: 'the file', kind: body === 'file' ? 'a settings file, raw or multipart' : 'any file of up to 20 MiB, raw or multipart', needed: true, says: '' })

/** What the table of routes says of one call. */
export function routeLine(name: string, route: RouteDeclaration): RouteLine {
  const [method = '', path = ''] = name.split(' ')
  return {
    name, method, path, says: route.says, may: mayWords(route.may), token: route.token ?? '', signs: route.sign === true,
    inputs: [...inputsOf('path', route.params), ...inputsOf('query', route.query), ...(typeof route.body === 'string' ? [fileInput(route.body)] : inputsOf('body', route.body))],
    answers: Object.entries(route.answers).map(([status, schema]) => ({ status, what: answerWords(schema) })),
  }
}

/** Calls by the first word of their path; what has one call only stands together, first. */
export function byResource(lines: readonly RouteLine[]): { readonly resource: string, readonly lines: readonly RouteLine[] }[] {
  const groups = new Map<string, RouteLine[]>()
  for (const line of lines) {
    const resource = (line.path.split('/')[2] ?? '').replace(/\.json$/, '')
    groups.set(resource, [...groups.get(resource) ?? [], line])
  }
  const several = [...groups].filter(([, held]) => held.length > 1).map(([resource, held]) => ({ resource, lines: held }))
  const single = [...groups.values()].filter(held => held.length === 1).flat()
  return single.length > 0 ? [{ resource: 'one of a kind', lines: single }, ...several] : several
}
