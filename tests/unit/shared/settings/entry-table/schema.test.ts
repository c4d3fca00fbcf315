import { describe, expect, it } from 'vitest'
import type { z } from 'zod'
import { columnSchema, entryTableSchema, parameterSchema } from '../../../../../shared/settings/entry-table/schema'
import { liftTable } from '../../../../support/entry-table'

/*
 * The borders of an entry table, each from both sides, with the place that a refusal names: the form shows it beside the
 * field, and a planner who types a list of a thousand parameters must not have to look for it.
 */

const long = (length: number) => 'x'.repeat(length)
const placesOf = (schema: z.ZodType, value: unknown) => schema.safeParse(value).error?.issues.map(({ path }) => path.join('/')) ?? []

type Border = readonly [field: string, taken: readonly unknown[], refused: readonly unknown[]]
function holds(schema: z.ZodType, whole: object, [field, taken, refused]: Border): void {
  for (const value of taken) expect(placesOf(schema, { ...whole, [field]: value }), `takes ${JSON.stringify(value)?.slice(0, 60)}`).toEqual([])
  for (const value of refused) expect(placesOf(schema, { ...whole, [field]: value }).every(place => place.startsWith(field)) && !schema.safeParse({ ...whole, [field]: value }).success, `refuses ${JSON.stringify(value)?.slice(0, 60)}`).toBe(true)
}

const ofValues: readonly Border[] = [
  ['field', ['a', 'softLimitMin', 'extra:K-017', long(80)], ['', long(81), 5, undefined, null]],
  ['unit', ['a', 'kg·cm²', long(16), undefined], ['', long(17), null]],
  ['factor', [0.000001, 1, 1e9, undefined], [0, -1, Number.POSITIVE_INFINITY, Number.NaN, '1', null]],
  ['step', [0.000001, 5, undefined], [0, -0.1, '5']],
  ['digits', [0, 9, undefined], [-1, 10, 1.5, '2']],
  ['rounding', ['half-even', 'down', 'up', undefined], ['half-up', 'nearest', '']],
  ['words', [{}, { extend: '0' }, { [long(40)]: long(40) }, undefined], [{ '': '0' }, { extend: '' }, { [long(41)]: '0' }, { extend: long(41) }, { extend: 0 }, 'extend']],
  ['none', ['-', long(16), undefined], ['', long(17), 0]],
]

describe('a parameter of the list', () => {
  const least = { number: 'K-001', field: 'softLimitMin' }

  it.each<Border>([...ofValues, ['number', ['1', 'K 001', long(64)], ['', long(65), 1, undefined]], ['name', ['a', long(80), undefined], ['', long(81)]]])('%s', (...border) => holds(parameterSchema, least, border))

  it('is closed: a misspelt rounding would round the usual way and nobody would see it', () => {
    for (const key of ['roundings', 'Factor', 'decimals', 'comment']) expect(parameterSchema.safeParse({ ...least, [key]: 'down' }).success, key).toBe(false)
  })
})

describe('a column of a table', () => {
  it.each<Border>([...ofValues, ['name', ['a', long(80)], ['', long(81), undefined]]])('%s', (...border) => holds(columnSchema, { name: 'Pos', field: 'target' }, border))

  it('has no number: its place is that of its name in the head', () => expect(columnSchema.safeParse({ name: 'Pos', field: 'target', number: '1' }).success).toBe(false))
})

describe('the layout of the list', () => {
  const many = (length: number, each: unknown) => Array.from({ length }, () => each)

  it.each<Border>([
    ['delimiter', [',', ';', '\t'], ['|', '', ' ', undefined]],
    ['decimal', ['point', 'comma'], ['.', '', undefined]],
    ['header', [[], [''], many(20, long(400))], [many(21, ''), [long(401)], [5], 'No.;Value', undefined]],
    ['parameters', [[], many(1000, { number: '1', field: 'softLimitMin' })], [many(1001, { number: '1', field: 'softLimitMin' }), [{ field: 'softLimitMin' }], undefined]],
    ['zones', [[], many(8, { name: 'a', field: 'from' })], [many(9, { name: 'a', field: 'from' }), [{ name: 'a' }], undefined]],
    ['moves', [[], many(32, { name: 'a', field: 'target' })], [many(33, { name: 'a', field: 'target' }), [{ field: 'target' }], undefined]],
  ])('%s', (...border) => holds(entryTableSchema, liftTable, border))

  it('counts its columns from 1; name and unit may have none, which is 0', () => {
    const columns = (more: object) => placesOf(entryTableSchema, { ...liftTable, columns: { number: 1, value: 2, name: 0, unit: 0, ...more } })
    expect([columns({}), columns({ number: 20, value: 19, name: 18, unit: 17 })]).toEqual([[], []])
    expect([columns({ number: 0 }), columns({ value: 0 }), columns({ name: -1 }), columns({ unit: 21 }), columns({ number: 1.5 })])
      .toEqual([['columns/number'], ['columns/value'], ['columns/name'], ['columns/unit'], ['columns/number']])
    expect(columns({ comment: 5 })).toEqual(['columns'])
  })

  it('names the place inside a long list', () => {
    const parameters = many(500, { number: '1', field: 'softLimitMin' }).map((entry, index) => index === 417 ? { number: '1', field: 'softLimitMin', digits: 10 } : entry)
    expect(placesOf(entryTableSchema, { ...liftTable, parameters })).toEqual(['parameters/417/digits'])
    expect(placesOf(entryTableSchema, { ...liftTable, moves: [{ name: 'Step', field: 'move' }, { name: '', field: 'target' }] })).toEqual(['moves/1/name'])
  })

  it('says what each of its fields is, for the form and the page about the interface', () => {
    for (const [name, field] of Object.entries({ ...parameterSchema.shape, ...columnSchema.shape })) expect(field.description?.length, name).toBeGreaterThan(10)
  })
})
