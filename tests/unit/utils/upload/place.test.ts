import { describe, expect, it } from 'vitest'
import type { JudgingContext } from '../../../../shared/api/uploads'
import type { Content } from '../../../../shared/settings/types'
import { examine, placeAxis, type Examined } from '../../../../utils/upload/place'
import { read } from './files'

const content = (setup: Content['setup']): Content => ({ axisKind: 'linear', setup, zones: [], moves: [], extra: {} })
const current = content({ thrustLimit: 40, homeOffset: 1 })
const now = new Date('2026-12-01T08:10:00Z')

const context = (over: Partial<JudgingContext> = {}): JudgingContext => ({
  problem: null, registered: { model: 'HL40-200V', serial: 'HL40-25-00914' }, axis: { id: 5, tag: 'CAS-01.Z', role: 'lower', axisKind: 'linear', flags: [], watched: [] },
  current: { versionId: 80, number: 8, contentHash: 'x', content: { ...current, moves: [] }, capturedAt: '2026-11-30T08:00:00.000Z', sightings: 3 },
  knownGood: { versionId: 70, number: 7, firmware: null, content: { ...current, moves: [] } }, nextNumber: 9, nameplate: null, rules: [], ...over,
})

const file = (id: number, setup: Content['setup'], exportedAt = '2026-12-01T08:00:00Z', over: Partial<JudgingContext> = {}) => {
  const settings = { ...read, content: content(setup), file: { ...read.file, setup, exportedAt } }
  return examine(id, `${id}.json`, settings, context(over), now)
}
const examined = (...args: Parameters<typeof file>): Examined => {
  const reading = file(...args)
  if ('state' in reading) throw new Error(`not placed: ${reading.state}`)
  return reading
}

describe('a file with no axis', () => {
  it('goes to the tray with its reason', () => {
    expect(file(1, {}, undefined, { axis: null, problem: 'serial-unknown' })).toMatchObject({ state: 'unplaced', problem: 'serial-unknown' })
    expect(file(1, {}, undefined, { axis: { ...context().axis, axisKind: 'rotary' } as JudgingContext['axis'] })).toMatchObject({ state: 'unplaced', problem: 'axis-kind', tag: 'CAS-01.Z' })
  })
})

describe('a file of an axis', () => {
  const one = (...args: Parameters<typeof file>) => placeAxis([examined(...args)], 'routine').get(args[0])

  it('is compared with what is current', () => {
    const reading = one(1, { thrustLimit: 44, homeOffset: 1 })
    expect(reading).toMatchObject({ number: 9, base: { number: 8, versionId: 80 }, identical: false, late: false, sameAsKnownGood: false, clockAhead: false })
    expect(reading?.changes).toMatchObject([{ field: 'thrustLimit', before: 40, after: 44, weight: 'harm', watched: true }])
  })
  it('is seen again where nothing differs', () => expect(one(1, { thrustLimit: 40, homeOffset: 1 })).toMatchObject({ identical: true, changes: [], number: 9 }))
  it('is the same as known-good where only the home offset differs', () => {
    const reading = one(1, { thrustLimit: 40, homeOffset: 2 })
    expect(reading).toMatchObject({ identical: false, sameAsKnownGood: true })
    expect(reading?.changes.map(change => change.field)).toEqual(['homeOffset'])
  })
  it('is the first where the axis has none', () => expect(one(1, {}, undefined, { current: null, knownGood: null, nextNumber: 1 })).toMatchObject({ base: null, number: 1, changes: [], knownGood: null }))
  it('is late where it was captured before the current one', () => expect(one(1, { thrustLimit: 1 }, '2026-11-29T08:00:00Z')).toMatchObject({ late: true }))
  it('has a clock ahead more than ten minutes before receipt, not at ten', () => {
    expect(one(1, {}, '2026-12-01T08:20:00Z')).toMatchObject({ clockAhead: false })
    expect(one(1, {}, '2026-12-01T08:20:01Z')).toMatchObject({ clockAhead: true })
  })
  it('is judged by the rules of the vault', () => {
    const rules: JudgingContext['rules'] = [{ id: 3, scope: 'site', field: 'thrustLimit', max: 42, reason: 'lids crack' }]
    expect(one(1, { thrustLimit: 44 }, undefined, { rules })?.checks).toContainEqual(expect.objectContaining({ rule: 'site-rule', level: 'stop' }))
  })
})

describe('what the dictionary calls a reading', () => {
  it('is no part of what is compared', () => {
    const settings = { ...read, content: { ...current, extra: { Hours: 9 } }, file: { ...read.file, ...current, extra: { Hours: 9 } } }
    const reading = examine(1, '1.json', settings, context({ nameplate: { model: 'HL40-200V', axisKind: 'linear', stroke: 200, dictionary: { Hours: { reading: true } } } }), now)
    expect('state' in reading ? undefined : placeAxis([reading], 'routine').get(1)).toMatchObject({ identical: true })
  })
})

describe('several files of one axis', () => {
  it('are told oldest first, each against the one before', () => {
    const later = examined(1, { thrustLimit: 46 }, '2026-12-01T08:00:00Z')
    const earlier = examined(2, { thrustLimit: 44 }, '2026-12-01T07:00:00Z')
    const placed = placeAxis([later, earlier], 'routine')
    expect(placed.get(2)).toMatchObject({ number: 9, base: { number: 8, versionId: 80 } })
    expect(placed.get(1)).toMatchObject({ number: 10, base: { number: 9, versionId: null, name: '2.json' }, late: false })
    expect(placed.get(1)?.changes).toMatchObject([{ before: 44, after: 46 }])
  })
  it('of equal content are one version and one sighting; on another occasion two versions', () => {
    const files = [examined(1, { thrustLimit: 44 }), examined(2, { thrustLimit: 44 }, '2026-12-01T08:05:00Z')]
    expect(placeAxis(files, 'routine').get(2)).toMatchObject({ identical: true, base: { number: 9 } })
    const third = examined(3, { thrustLimit: 50 }, '2026-12-01T08:06:00Z')
    expect(placeAxis([...files, third], 'routine').get(3)?.number).toBe(10)
    expect(placeAxis([...files, third], 'as-left').get(3)?.number).toBe(11)
  })
})
