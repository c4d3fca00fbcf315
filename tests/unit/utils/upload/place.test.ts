import { describe, expect, it } from 'vitest'
import type { JudgingContext } from '../../../../shared/api/uploads'
import type { Content } from '../../../../shared/settings/types'
import { examine, placeAxis, type Examined } from '../../../../utils/upload/place'
import { read } from './files'

const content = (setup: Content['setup']): Content => ({ axisKind: 'linear', setup, zones: [], moves: [], extra: {} })
const current = content({ thrustLimit: 40, homeOffset: 1 })
const now = new Date('2026-12-01T08:10:00Z')

const context = (over: Partial<JudgingContext> = {}): JudgingContext => ({
  problem: null, registered: { model: 'HL40-200V', serial: 'HL40-25-00914' }, axis: { id: 5, tag: 'CAS-01.Z', role: 'lower', axisKind: 'linear', flags: [], watched: [], duty: null, controllerScanMs: null },
  current: { versionId: 80, number: 8, contentHash: 'x', content: { ...current, moves: [] }, capturedAt: '2026-11-30T08:00:00.000Z', sightings: 3 },
  knownGood: { versionId: 70, number: 7, firmware: null, content: { ...current, moves: [] } }, broughtFrom: null, waivers: [], nextNumber: 9, nameplate: null, rules: [], ...over,
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

describe('what the vault says besides', () => {
  const one = (setup: Content['setup'], over: Partial<JudgingContext>) => placeAxis([examined(1, setup, undefined, over)], 'routine').get(1)
  const rules: JudgingContext['rules'] = [{ id: 3, scope: 'site', field: 'thrustLimit', max: 42, reason: 'lids crack' }]
  const waiver = (thrustLimit: number, until = '2026-12-02T00:00:00.000Z'): JudgingContext['waivers'][number] => ({
    id: 4, axisId: 5, rule: 'site-rule', at: ['/setup/thrustLimit'], reason: 'thick lids', until, by: 'Runa Haldersen', givenAt: '2026-11-01T00:00:00.000Z', endedAt: null, endedBy: null, endReason: null,
    value: { level: 'stop', values: [{ place: '/setup/thrustLimit', value: thrustLimit }, { place: 'ruleId', value: 3 }] },
  })
  const stopsOf = (setup: Content['setup'], held: JudgingContext['waivers'][number]) => {
    const reading = one(setup, { rules, waivers: [held] })
    return [reading?.checks.filter(({ level }) => level === 'stop').map(({ rule }) => rule), reading?.accepted.map(({ result, waiver: by }) => [result.rule, by.by])]
  }

  it('parts a stop that somebody accepted from those that stand, for its value and until its end', () => {
    expect(stopsOf({ thrustLimit: 44 }, waiver(44))).toEqual([[], [['site-rule', 'Runa Haldersen']]])
    expect(stopsOf({ thrustLimit: 45 }, waiver(44))).toEqual([['site-rule'], []])
    expect(stopsOf({ thrustLimit: 44 }, waiver(44, now.toISOString()))).toEqual([['site-rule'], []])
  })

  it('goes by the controller’s scan of the machine', () => {
    const nameplate: JudgingContext['nameplate'] = { model: 'HL40-200V', axisKind: 'linear', stroke: 200, inputFilterTime: 2 }
    const timing = (controllerScanMs: number | null) => one({ startPulseTime: 8 }, { nameplate, axis: { ...context().axis, controllerScanMs } as JudgingContext['axis'] })?.checks.filter(({ rule, level }) => rule === 'start-timing' && level === 'warn')
    expect(timing(null)).toEqual([])
    // 2 ms of filter and 10 ms of scan: 12 ms, 4 more than the pulse.
    expect(timing(10)).toMatchObject([{ values: { value: 8, least: 12 } }])
  })

  it('stops percentages that stand as on the unit before, where 100 % meant another force', () => {
    const nameplate: JudgingContext['nameplate'] = { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 800 }
    const stop = (thrustLimit: number, rescaled: boolean) => one({ thrustLimit }, { nameplate, broughtFrom: { content: { ...current, moves: [] }, forceBase: 640, rescaled } })?.checks.filter(({ rule }) => rule === 'force-rescale').map(({ level }) => level)
    expect([stop(40, false), stop(32, false), stop(40, true)]).toEqual([['stop'], [], []])
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
