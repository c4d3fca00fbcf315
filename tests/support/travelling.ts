import { expect, it } from 'vitest'
import { z } from 'zod'

/*
 * The laws of a record as it travels. An answer that lacks a field, or has null where there is always something, is one that a
 * page or a script would stumble over: both are refused for each field in turn.
 */

/** A record by hand; what it does not name is filled in and not looked at. */
export interface Travelling { readonly what: string, readonly schema: z.ZodObject, readonly record: object, readonly nullable: readonly string[], readonly optional?: readonly string[] }

interface Json { readonly type?: string, readonly anyOf?: readonly Json[], readonly enum?: readonly unknown[], readonly format?: string, readonly exclusiveMinimum?: number, readonly properties?: Readonly<Record<string, Json>>, readonly required?: readonly string[] }

/** Some value that a schema takes: null where it may be, else the least of its type. */
function someOf({ type, anyOf, enum: choice, format, exclusiveMinimum, properties = {}, required = [] }: Json): unknown {
  if (anyOf) return anyOf.some(each => each.type === 'null') ? null : someOf(anyOf[0] ?? {})
  if (choice) return choice[0]
  if (type === 'object') return Object.fromEntries(required.map(key => [key, someOf(properties[key] ?? {})]))
  if (type === 'string') return format === 'date-time' ? '2026-11-30T08:15:00.000Z' : 'x'
  return type === 'array' ? [] : type === 'boolean' ? false : exclusiveMinimum === undefined ? 0 : exclusiveMinimum + 1
}

/** Holds one kind of record to the laws. */
export function travels({ schema, record: written, nullable, optional = [] }: Travelling): void {
  const record = { ...someOf(z.toJSONSchema(schema, { unrepresentable: 'any' }) as Json) as object, ...written }

  it('is taken whole, as JSON too', () => {
    expect(schema.safeParse(record).error?.issues ?? []).toEqual([])
    expect(schema.parse(JSON.parse(JSON.stringify(record)))).toEqual(record)
  })

  it('is refused without a field that is always there, and taken without one that may be absent', () => {
    for (const key of [...Object.keys(written), ...optional]) {
      const { [key]: _gone, ...rest } = record as Record<string, unknown>
      expect(schema.safeParse(rest).success, key).toBe(optional.includes(key))
    }
  })

  it('has null only where there may be nothing', () => {
    const takesNull = Object.keys(schema.shape).filter(key => schema.safeParse({ ...record, [key]: null }).success)
    expect(takesNull.filter(key => key in written || optional.includes(key)).sort()).toEqual([...nullable].sort())
  })

  it('is refused with another kind of value in a field', () => {
    for (const key of Object.keys(written)) expect(schema.safeParse({ ...record, [key]: { no: 'such' } }).success, key).toBe(false)
  })
}
