import fc from 'fast-check'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../server/database/actor'
import { inserter } from '../../../server/database/inserter'
import { readContent } from '../../../server/database/content/queries'
import { valueQueries } from '../../../server/database/value/queries'
import { rule } from '../../../server/database/schema'
import { axisValues } from '../../../server/services/axes/values'
import { markKnownGood, markNone } from '../../../server/services/known-good/mark'
import { endRule } from '../../../server/services/rules/rules'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { voidVersion } from '../../../server/services/versions/void-version'
import { day, iso, minute, openLidPlant, openPlant, settingsFile, start, type FileParts, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let axisId: number

beforeEach(() => {
  ({ plant, runa, tobias, axisId } = openLidPlant())
})
afterEach(() => plant.close())

function send(setup: object, rest: FileParts = {}, words = {}) {
  plant.now += day
  return storeUpload(plant.vault, tobias, { bytes: settingsFile({ setup, exportedAt: iso(plant.now), ...rest }), name: 'lid.json' }, words)
}
function store(setup: object, rest: FileParts = {}, words = {}): number {
  const outcome = send(setup, rest, words)
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
const thrust = () => axisValues(plant.vault, axisId, { field: 'thrustLimit' })
const told = () => thrust().steps.map(({ number, value }) => `v${number} ${JSON.stringify(value)}`)

describe('one value over time', () => {
  it('has a step for each version that changed it, with who and why and when it was last seen before', () => {
    store({ thrustLimit: 38 })
    const firstAt = iso(plant.now)
    send({ thrustLimit: 38 })
    const seenAt = iso(plant.now)
    store({ thrustLimit: 38, jogSpeed: 20 })
    store({ thrustLimit: 55, jogSpeed: 20 }, {}, { changedBy: `person:${tobias.id}`, reason: 'lids stood proud', workOrder: 'WO-1' })
    expect(told()).toEqual(['v1 38', 'v3 55'])
    const [first, second] = thrust().steps
    expect(first).toMatchObject({ at: firstAt, unit: '%', before: null, changedBy: null, serial: 'SN-0001', model: 'HL40-200V' })
    expect(second).toMatchObject({ before: { number: 2 }, changedBy: 'Tobias Achterberg', reason: 'lids stood proud', workOrder: 'WO-1', storedBy: 'Tobias Achterberg' })
    expect(thrust()).toMatchObject({ versions: 3, leftOut: 0 })
    store({ thrustLimit: 38, jogSpeed: 21 })
    send({ thrustLimit: 38, jogSpeed: 21 })
    store({ thrustLimit: 40, jogSpeed: 21 })
    expect(thrust().steps.at(-1)?.before?.seenAt).toBe(iso(plant.now - day))
    expect(seenAt > firstAt).toBe(true)
  })

  it('says where it is not set, and begins where it is first set', () => {
    store({ jogSpeed: 20 })
    store({ jogSpeed: 20, thrustLimit: 38 })
    store({ jogSpeed: 20 })
    expect(told()).toEqual(['v2 38', 'v3 null'])
  })

  it('leaves void versions out and counts them', () => {
    store({ thrustLimit: 38 })
    const wrong = store({ thrustLimit: 99 })
    store({ thrustLimit: 38, jogSpeed: 20 })
    voidVersion(plant.vault, runa, wrong, 'another axis')
    expect(told()).toEqual(['v1 38'])
    expect(thrust()).toMatchObject({ versions: 2, leftOut: 1 })
  })

  it('reads moves by number, zones and the drive’s own values, each with its unit', () => {
    const move = (target: number) => ({ move: 5, kind: 'press', target, speed: 20, acceleration: 200, approach: 10, forceLimit: 30 })
    store({}, { moves: [move(50)], zones: [{ zone: 1, from: 1, to: 2 }], extra: { 'K-017': { value: 4, unit: 'ms' } } })
    store({}, { moves: [move(60)], zones: [{ zone: 1, from: 1, to: 3 }], extra: { 'K-017': { value: 5, unit: 'ms' } } })
    const values = (section: 'move' | 'zone' | 'extra', field: string, row?: number) => axisValues(plant.vault, axisId, { section, field, row }).steps.map(({ value, unit }) => [value, unit])
    expect(values('move', 'target', 5)).toEqual([[50, 'mm'], [60, 'mm']])
    expect(values('move', 'target', 6)).toEqual([])
    expect(values('zone', 'to', 1)).toEqual([[2, 'mm'], [3, 'mm']])
    expect(values('extra', 'K-017')).toEqual([[{ value: 4, unit: 'ms' }, 'ms'], [{ value: 5, unit: 'ms' }, 'ms']])
  })

  it.each([
    { field: 'thrust' }, { field: 'thrustLimit', row: 1 }, { section: 'move', field: 'target' }, { section: 'zone', field: 'target', row: 1 },
  ] as const)('refuses %j', (query) => {
    expect(() => axisValues(plant.vault, axisId, query)).toThrow(expect.objectContaining({ code: 'input' }))
  })

  it('says what was known-good and how long; a mark of none ends it', () => {
    const v1 = store({ thrustLimit: 38 })
    markKnownGood(plant.vault, runa, v1, { meaning: 'approved' })
    const from = iso(plant.now)
    plant.now += day
    markNone(plant.vault, runa, axisId, { meaning: 'reviewed' })
    const to = iso(plant.now)
    const v2 = store({ jogSpeed: 20 })
    markKnownGood(plant.vault, runa, v2, { meaning: 'approved' })
    expect(thrust().knownGood).toMatchObject([{ number: 1, value: 38, from, to }, { number: 2, value: null, to: null }])
  })

  it('brings the bounds of site rules, ended ones too, and of the nameplates of the units that sat there', () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640, peakThrust: 1600 })
    const make = (values: object) => inserter(plant.vault.db, rule)({ scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', min: null, max: null, fixed: null, reason: 'jars crack', madeAt: iso(start), madeBy: runa.id, ...values })
    make({ max: 45 })
    endRule(plant.vault, runa, make({ fixed: 40 }), { reason: 'trial over' })
    make({ field: 'speedLimit', max: 1 })
    make({ scopeId: plant.siteId + 1, max: 2 })
    store({ thrustLimit: 38 })
    const begun = iso(plant.now)
    expect(thrust().bounds).toEqual([
      { by: 'rule', max: 45, from: iso(start), to: null, words: 'jars crack' },
      { by: 'rule', min: 40, max: 40, from: iso(start), to: iso(start), words: 'jars crack' },
      { by: 'nameplate', max: 250, from: begun, to: null, words: 'HL40-200V' },
    ])
  })

  it('law: however late files come and whichever are voided, it is what the contents say', () => {
    const upload = fc.record({ thrust: fc.constantFrom(undefined, 38, 40, 55), jog: fc.integer({ min: 1, max: 4 }), days: fc.integer({ min: 0, max: 60 }), wrong: fc.boolean() })
    fc.assert(fc.property(fc.array(upload, { minLength: 1, maxLength: 8 }), (uploads) => {
      const own = openPlant()
      try {
        const person = own.person('Runa Haldersen')
        const axis = own.axis('LID-09.Z')
        own.fit(axis, own.unit('SN-0001'), start - 300 * day)
        for (const { thrust: thrustLimit, jog, days, wrong } of uploads) {
          own.now += minute
          const stored = storeUpload(own.vault, person, { bytes: settingsFile({ setup: { ...(thrustLimit && { thrustLimit }), jogSpeed: jog }, exportedAt: iso(own.now - days * day) }), name: 'x.json' }, {})
          if (wrong && stored.outcome === 'version') voidVersion(own.vault, person, stored.answer.version.id, 'wrong')
        }
        const all = valueQueries(own.vault.db).versions.all({ axisId: axis }).filter(({ voidAt }) => voidAt === null)
        const values = all.map(({ number, contentId }) => ({ number, value: readContent(own.vault.db, contentId).setup.thrustLimit ?? null }))
        const expected = values.filter(({ value }, index) => value !== (values[index - 1]?.value ?? null))
        expect(axisValues(own.vault, axis, { field: 'thrustLimit' }).steps.map(({ number, value }) => ({ number, value }))).toEqual(expected)
      }
      finally { own.close() }
    }), { numRuns: 15 })
  })
})
