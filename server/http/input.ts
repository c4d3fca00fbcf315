import type { z } from 'zod'
import type { ProblemError } from '#shared/api/common'
import { Refusal } from '#shared/errors/refusal'

const most = 100

const pointer = (path: readonly PropertyKey[]) => path.map(part => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('')

const prefixes = { params: ':', query: '?', body: '' } as const

function errorsOf(issues: readonly z.core.$ZodIssue[], part: keyof typeof prefixes): ProblemError[] {
  return issues.flatMap((issue) => {
    const places = issue.code === 'unrecognized_keys' ? issue.keys.map(key => [...issue.path, key]) : [issue.path]
    return places.map(path => ({
      at: part === 'body' ? pointer(path) : prefixes[part] + path.map(String).join('.'),
      code: issue.code.replaceAll('_', '-'),
      message: issue.code === 'unrecognized_keys' ? 'not known here' : issue.message,
    }))
  })
}

/** The value as the schema reads it, or a refusal that names every place: `/body/pointer`, `?query`, `:parameter`. */
export function checked(schema: z.ZodType, value: unknown, part: keyof typeof prefixes): unknown {
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  const errors = errorsOf(parsed.error.issues, part)
  const first = errors[0]
  throw new Refusal('input', first === undefined ? 'Not as it should be.' : `${first.at || 'the body'}: ${first.message}`, {
    errors: errors.slice(0, most), more: Math.max(0, errors.length - most),
  })
}

/** Query values by name; an empty one is the same as none, one given twice is refused. */
export function queryOf(url: string): Record<string, string> {
  const at = url.indexOf('?')
  const query: Record<string, string> = {}
  if (at < 0) return query
  for (const [name, value] of new URLSearchParams(url.slice(at + 1))) {
    if (value === '') continue
    if (Object.hasOwn(query, name)) throw new Refusal('input', `?${name}: given twice.`, { errors: [{ at: `?${name}`, code: 'twice', message: 'given twice' }] })
    query[name] = value
  }
  return query
}
