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

/* Borders of the published shape, each from both sides. A program that is held against it must not be surprised by the reader. */
describe('the borders of the shape', () => {
  const whole = JSON.parse(writeJson(pressExample)) as Readonly<Record<string, object>>
  const takes = (change: object) => settingsInput.safeParse({ ...whole, ...change }).success
  const row = { move: 0, kind: 'absolute', target: 0, speed: 1, acceleration: 1 }

  it.each([
    ['jogSpeed', [0, 1e9], [-0.000001, 1000000000.1]], ['softLimitMin', [-1e9, 1e9], [-1000000000.1, 1000000000.1]], ['modulo', [0.000001], [0]],
    ['mountingAngle', [-90, 90], [-90.000001, 90.000001]], ['selectInputs', [0, 10], [11, -1, 0.5]], ['nodeAddress', [0, 65535], [65536, 1.5]],
    ['velocityGain', [-5, 1e30, 1e-30], ['5', true]], ['brakeFitted', [true, false], ['true', 1]], ['positiveDirection', ['extend', 'clockwise'], ['up']],
  ])('of %s', (name, taken, refused) => {
    for (const value of taken) expect(takes({ setup: { [name]: value } }), String(value)).toBe(true)
    for (const value of refused) expect(takes({ setup: { [name]: value } }), String(value)).toBe(false)
    for (const value of [null, '']) expect(takes({ setup: { [name]: value } }), String(value)).toBe(true)
  })

  it.each([
    ['move', [0, 1023], [-1, 1024, 0.5]], ['speed', [0, 1e9], [-1]], ['window', [0], [-0.1]], ['next', [0, 1023], [1024, -1]], ['dwell', [0], [-1]],
    ['label', ['a', 'ä'.repeat(40)], ['a'.repeat(41)]], ['comment', ['a'.repeat(200)], ['a'.repeat(201)]], ['turn', ['signed', 'shortest'], ['left']],
  ])('of %s of a move', (name, taken, refused) => {
    for (const value of taken) expect(takes({ moves: [{ ...row, [name]: value }] }), String(value)).toBe(true)
    for (const value of refused) expect(takes({ moves: [{ ...row, [name]: value }] }), String(value)).toBe(false)
  })

  it('of a table: 32 zones and 1,024 moves', () => {
    const zones = (count: number) => Array.from({ length: count }, () => ({ zone: 1, from: 0, to: 1 }))
    const moves = (count: number) => Array.from({ length: count }, () => row)
    expect([takes({ zones: zones(32) }), takes({ zones: zones(33) }), takes({ moves: moves(1024) }), takes({ moves: moves(1025) })]).toEqual([true, false, true, false])
  })

  it('of an identity', () => {
    const unit = { serial: 'A1', model: 'HL40-200V' }
    for (const more of [{ channel: 0 }, { channel: 255 }, { firmware: 'x'.repeat(32) }, { actuatorSerial: '' }]) expect(takes({ unit: { ...unit, ...more } })).toBe(true)
    for (const more of [{ channel: 256 }, { channel: -1 }, { firmware: 'x'.repeat(33) }, { serial: 'A 1' }, { serial: '' }, { colour: 'red' }]) expect(takes({ unit: { ...unit, ...more } })).toBe(false)
  })

  it('of a value of the drive', () => {
    for (const value of [1e300, true, '', 'x'.repeat(256), { value: 1, unit: 'counts' }, null]) expect(takes({ extra: { K: value } }), JSON.stringify(value)).toBe(true)
    for (const value of ['x'.repeat(257), { value: 1 }, { value: 1, unit: '' }, { value: '1', unit: 'A' }, [1], {}]) expect(takes({ extra: { K: value } }), JSON.stringify(value)).toBe(false)
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
