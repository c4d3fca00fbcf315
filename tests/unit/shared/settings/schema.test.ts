import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { exampleFiles, pressExample } from '../../../../shared/settings/examples'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { moveFieldNames } from '../../../../shared/settings/move-fields'
import { readJson } from '../../../../shared/settings/json-reader'
import { settingsInput, settingsJsonSchema } from '../../../../shared/settings/schema'
import { writeJson } from '../../../../shared/settings/write-json'

const folder = new URL('../../../../fixtures/settings/', import.meta.url)
const cases = JSON.parse(readFileSync(new URL('cases.json', folder), 'utf8')) as readonly { readonly file: string, readonly contentHash?: string }[]

/** A part of the schema by its keys. */
const part = (...keys: string[]) => keys.reduce<unknown>((node, key) => (node as Readonly<Record<string, unknown>>)[key], settingsJsonSchema())

describe('the zod schema', () => {
  it('takes every file that is read, unless rounding alone brings a number into its range', () => {
    for (const each of cases.filter(one => one.contentHash && one.file.startsWith('json/') && one.file !== 'json/rounding.json')) {
      const text = readFileSync(new URL(each.file, folder), 'utf8').replace(/^\ufeff/, '')
      expect(settingsInput.safeParse(JSON.parse(text)).error?.issues, each.file).toBeUndefined()
    }
    for (const file of exampleFiles) expect(settingsInput.parse(JSON.parse(writeJson(file)))).toEqual(file)
  })

  it('refuses nothing in the press example that the reader takes, key by key', () => {
    const file = JSON.parse(writeJson(pressExample)) as Record<string, unknown>
    for (const key of ['setup', 'zones', 'moves', 'extra', 'readings', 'note', 'exportedBy']) {
      for (const value of [null, undefined]) {
        const text = JSON.stringify({ ...file, [key]: value })
        expect(settingsInput.safeParse(JSON.parse(text)).success).toBe(readJson(text).ok)
      }
    }
  })

  it.each([
    ['a missing serial', { unit: { model: 'HL40-200V' } }], ['another schema', { schema: 'witnessmark.axis-settings/2' }], ['an unknown key', { colour: 'red' }], ['an unknown setup field', { setup: { softlimitmax: 180 } }],
    ['a number in quotes', { setup: { softLimitMax: '180' } }], ['a word that is none', { setup: { homingMethod: 'hardstop' } }], ['a row number out of range', { zones: [{ zone: 33, from: 1, to: 2 }] }],
    ['a row without its target', { moves: [{ move: 0, kind: 'absolute', speed: 1, acceleration: 1 }] }], ['a speed below zero', { moves: [{ move: 0, kind: 'absolute', target: 0, speed: -1, acceleration: 1 }] }],
    ['33 zones', { zones: Array.from({ length: 33 }, (_, index) => ({ zone: index, from: 0, to: 1 })) }], ['a list in extra', { extra: { K: [1] } }], ['a label of 41 letters', { moves: [{ move: 0, label: 'a'.repeat(41), kind: 'absolute', target: 0, speed: 1, acceleration: 1 }] }],
  ])('refuses %s, as the reader does', (_, change) => {
    const text = JSON.stringify({ ...JSON.parse(writeJson(pressExample)) as object, ...change })
    expect(settingsInput.safeParse(JSON.parse(text)).success).toBe(false)
    expect(readJson(text).ok).toBe(false)
  })
})

describe('the published JSON Schema', () => {
  it('is draft 2020-12 and plain JSON', () => {
    const schema = settingsJsonSchema()
    expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema')
    expect(JSON.parse(JSON.stringify(schema))).toEqual(schema)
  })

  it('is strict wherever the format is', () => {
    expect(part('additionalProperties')).toBe(false)
    expect(part('properties', 'unit', 'additionalProperties')).toBe(false)
    expect(part('required')).toEqual(['schema', 'unit', 'exportedAt', 'axisKind'])
    expect(part('properties', 'unit', 'required')).toEqual(['serial', 'model'])
  })

  it('has every setup field with its words and unit', () => {
    const setup = (part('properties', 'setup', 'anyOf') as readonly Readonly<Record<string, unknown>>[])[0]
    expect(Object.keys(setup?.properties as object).sort()).toEqual([...setupFieldNames].sort())
    const text = JSON.stringify(setup)
    for (const name of setupFieldNames) expect(text).toContain(JSON.stringify(setupFields[name].help).slice(1, -1))
    expect(text).toContain('Unit: mm (linear), deg (rotary).')
    expect(text).toContain('Unit: kg·cm² (rotary).')
  })

  it('has every move field', () => {
    const moves = (part('properties', 'moves', 'anyOf') as readonly Readonly<Record<string, unknown>>[])[0]
    expect(moves?.maxItems).toBe(1024)
    const items = moves?.items as Readonly<Record<string, unknown>>
    expect(Object.keys(items.properties as object).sort()).toEqual([...moveFieldNames, 'move'].sort())
    expect(items.required).toEqual(['move', 'kind', 'target', 'speed', 'acceleration'])
  })
})
