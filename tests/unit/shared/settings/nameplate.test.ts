import { describe, expect, it } from 'vitest'
import { dictionaryEntrySchema, nameplateSchema } from '../../../../shared/settings/nameplate'

const least = { model: 'HL40-200V', axisKind: 'linear', stroke: 200 }
const takes = (more: object) => nameplateSchema.safeParse({ ...least, ...more }).success
const entry = (value: object) => dictionaryEntrySchema.safeParse(value).success

/** Just inside and just outside: what is taken and what is refused of each field. */
const edges: readonly (readonly [field: string, taken: readonly unknown[], refused: readonly unknown[]])[] = [
  ['model', ['a', 'x'.repeat(64)], ['', 'x'.repeat(65), 40, null]],
  ['axisKind', ['linear', 'rotary'], ['Linear', 'gantry', '']],
  ['stroke', [0.001, 20000], [0, -200, Number.POSITIVE_INFINITY, Number.NaN, '200']],
  ['hardMargin', [0, 2.5], [-0.001, Number.POSITIVE_INFINITY]],
  ['maxSpeed', [0.001], [0, -1]],
  ['maxAcceleration', [0.001], [0, -1]],
  ['ratedThrust', [0.1], [0]],
  ['peakThrust', [0.1], [0]],
  ['forceBase', ['rated-thrust', 'peak-thrust'], ['rated', '']],
  ['pressForceMin', [0, 20], [-1]],
  ['pressForceMax', [70], [0]],
  ['forceLimitActsBothWays', [true, false], ['true', 1]],
  ['maxImpactEnergy', [0.35], [0]],
  ['resolution', [0.000001], [0]],
  ['efficiency', [0.0001, 1], [0, 1.0001, 90]],
  ['movingMass', [0, 1.8], [-0.1]],
  ['rotorInertia', [0, 0.12], [-0.01]],
  ['gearRatio', [0.1, 1, 50], [0, -3]],
  ['maxMoves', [1, 1024], [0, 1025, 16.5]],
  ['firstMove', [0, 1], [2, -1, true]],
  ['allOff', ['first', 'none', 'home'], ['hold']],
  ['strobe', ['edge', 'level'], ['pulse']],
  ['maxSelectInputs', [0, 10], [11, -1, 3.5]],
  ['inputFilterTime', [0, 5], [-1]],
  ['inputSwitching', ['p', 'n'], ['pnp', 'P']],
  ['brakeHolding', [180], [0]],
  ['encoder', ['incremental', 'absolute', 'absolute-battery'], ['battery']],
  ['homeOffsetSense', ['zero-is-home-plus-offset', 'home-reads-offset'], ['plus']],
  ['decimals', [0, 6], [7, -1, 1.5]],
  ['firmwareSeen', [[], ['2.4', '3.12'], Array.from({ length: 64 }, (_, n) => `1.${n}`)], [[''], ['x'.repeat(33)], Array.from({ length: 65 }, (_, n) => `1.${n}`), '2.4']],
  ['note', ['', 'x'.repeat(2000)], ['x'.repeat(2001)]],
  ['dictionary', [{}, { 'K-017': {} }], [{ '': {} }, { ['k'.repeat(65)]: {} }, { 'K-017': 15 }]],
]

describe('a nameplate', () => {
  it('needs a model, an axis kind and a stroke, and no more', () => {
    expect(nameplateSchema.parse(least)).toEqual(least)
    for (const key of Object.keys(least)) expect(takes({ [key]: undefined }), key).toBe(false)
  })

  it.each(edges)('%s', (field, taken, refused) => {
    for (const value of taken) expect(takes({ [field]: value }), JSON.stringify(value)).toBe(true)
    for (const value of refused) expect(takes({ [field]: value }), JSON.stringify(value)).toBe(false)
  })

  it('has no field that nobody knows: a misspelt one would be a check that never runs', () => {
    for (const key of ['maxspeed', 'max_speed', 'weight', 'constructor']) expect(takes({ [key]: 1 })).toBe(false)
  })

  it('says the unit of every quantity', () => {
    const bare = new Set(['efficiency', 'maxMoves', 'maxSelectInputs', 'firstMove', 'decimals'])
    for (const [name, schema] of Object.entries(nameplateSchema.shape)) {
      const isNumber = schema.safeParse(1).success && !schema.safeParse(true).success && !schema.safeParse('x').success
      if (isNumber && !bare.has(name) && name !== 'stroke') expect(schema.description, name).toMatch(/mm|deg|N|%|J|kg|ms|turns/)
    }
    expect(nameplateSchema.shape.stroke.description).toBe('mm or deg')
  })
})

describe('an entry of the dictionary', () => {
  it('may say nothing', () => expect(dictionaryEntrySchema.parse({})).toEqual({}))

  it.each([
    [{ name: 'thrust, most', unit: '%', min: 0, max: 100, weight: 'harm', carry: 'copy' }, true],
    [{ allowed: [0, 'B', false] }, true], [{ reading: true }, true], [{ min: -5, max: -10 }, true],
    [{ name: '' }, false], [{ name: 'x'.repeat(81) }, false], [{ unit: 'x'.repeat(17) }, false],
    [{ weight: 'danger' }, false], [{ carry: 'keep' }, false], [{ allowed: [null] }, false], [{ allowed: Array.from({ length: 65 }, (_, n) => n) }, false],
    [{ max: Number.POSITIVE_INFINITY }, false], [{ label: 'thrust' }, false],
  ])('%j: %s', (value, taken) => expect(entry(value)).toBe(taken))
})
