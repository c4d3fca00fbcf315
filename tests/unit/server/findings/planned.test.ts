import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { z } from 'zod'
import type { plannedChangeBody } from '../../../../shared/api/findings'
import { closeFinding, readFinding } from '../../../../server/services/findings/findings'
import { rangeWords } from '../../../../server/services/planned-changes/ranges'
import { announceChange, endPlannedChange, listPlannedChanges, readPlannedChange } from '../../../../server/services/planned-changes/planned-changes'
import { codeOf } from '../../../support/codes'
import { openFindingsPlant, type FindingsPlant } from '../../../support/findings-plant'
import { day, hour, iso } from '../../../support/vault-plant'

let plant: FindingsPlant
beforeEach(() => { plant = openFindingsPlant() })
afterEach(() => plant.close())

type Plan = z.output<typeof plannedChangeBody>
const announce = (parts: Partial<Plan> = {}) => announceChange(plant.vault, plant.runa, {
  axisIds: [plant.axisId], fields: ['thrustLimit'], min: 40, max: 60, from: iso(plant.now), until: iso(plant.now + day), reason: 'thicker lids', allowedBy: 'Marit Lund', ...parts,
}).id
const state = (setup: object, options?: Parameters<FindingsPlant['upload']>[1]) => plant.upload({ speedLimit: 500, ...setup }, options).findings[0]?.state

describe('an announced change', () => {
  it('explains what it covers, by the words of who announced it; another one closes', () => {
    const id = announce()
    expect(state({ thrustLimit: 55 }, { by: plant.token('nightly', plant.tobias) })).toBe('explained')
    expect(readFinding(plant.vault, 1).explanations).toMatchObject([{ by: 'Runa Haldersen', plannedChangeId: id, text: 'Announced before: thicker lids. Allowed by Marit Lund.' }])
    const both = { ...plant.runa, roles: ['planner', 'auditor'] as ('planner' | 'auditor')[] }
    expect(codeOf(() => closeFinding(plant.vault, both, 1, { as: 'accepted', allowedBy: 'Marit' }))).toBe('four-eyes')
    expect(readPlannedChange(plant.vault, plant.ines, id)).toMatchObject({
      axes: [{ id: plant.axisId, tag: 'LID-02.Z' }], fields: ['thrustLimit'], announcedBy: 'Runa Haldersen', timeZone: 'Europe/Berlin',
      came: [{ findingId: 1, tag: 'LID-02.Z', number: 2, state: 'explained' }],
    })
  })

  it.each([
    ['another field', { fields: ['speedLimit'] }, 'open'],
    ['a value below its range', { min: 56 }, 'open'],
    ['a value above it', { max: 54.9 }, 'open'],
    ['the very ends of its range', { min: 55, max: 55 }, 'explained'],
    ['no range', { min: undefined, max: undefined }, 'explained'],
    ['a window yet to come', { from: iso(Date.parse('2026-03-02T00:00:00Z')), until: iso(Date.parse('2026-03-03T00:00:00Z')) }, 'open'],
  ])('%s', (_, parts, expected) => {
    announce(parts)
    expect(state({ thrustLimit: 55 })).toBe(expected)
  })

  it('covers a change that may have been made in its window, though it is seen after it', () => {
    announce({ until: iso(plant.now + hour / 2) })
    expect(state({ thrustLimit: 55 })).toBe('explained')
    expect(state({ thrustLimit: 56 })).toBe('open')
  })

  it('covers nothing that the drive was known to hold before it was announced', () => {
    const captured = plant.now + hour / 4
    plant.now += hour / 2
    announce({ from: iso(captured - hour) })
    expect(state({ thrustLimit: 55 }, { at: captured })).toBe('open')
  })

  it('leaves a finding open where another watched value changed with it; two plans explain two', () => {
    announce()
    expect(state({ thrustLimit: 55, speedLimit: 600 })).toBe('open')
    announce({ fields: ['speedLimit'], min: undefined, max: 900, reason: 'faster line' })
    expect(state({ thrustLimit: 56, speedLimit: 700 })).toBe('explained')
    expect(readFinding(plant.vault, 2).explanations).toHaveLength(2)
  })

  it.each([
    ['both in their own ranges', { thrustLimit: 55, speedLimit: 600 }, 'explained'],
    ['one outside its own', { thrustLimit: 61, speedLimit: 600 }, 'open'],
    ['the other outside its own', { thrustLimit: 55, speedLimit: 601 }, 'open'],
    ['a value that would fit the other field', { thrustLimit: 38, speedLimit: 55 }, 'open'],
  ])('of several fields holds each to its own range: %s', (_, setup, expected) => {
    announce({ fields: ['thrustLimit', 'speedLimit'], min: undefined, max: undefined, ranges: [{ field: 'thrustLimit', min: 40, max: 60 }, { field: 'speedLimit', min: 550, max: 600 }] })
    expect(state(setup)).toBe(expected)
  })

  it('of several fields keeps min and max for those without a range of their own, and tells each', () => {
    const id = announce({ fields: ['thrustLimit', 'overloadLevel', 'move.label'], min: undefined, max: undefined, ranges: [{ field: 'thrustLimit', max: 60 }] })
    expect(readPlannedChange(plant.vault, plant.ines, id).ranges).toEqual([{ field: 'thrustLimit', min: null, max: 60 }, { field: 'overloadLevel', min: null, max: null }, { field: 'move.label', min: null, max: null }])
    expect(rangeWords({ fields: ['thrustLimit', 'move.speed', 'extra:K-017'], min: 5, max: null, ranges: [{ field: 'thrustLimit', min: 40, max: 60 }] }, 'rotary'))
      .toEqual(['thrust limit, 40 to 60 %', 'move speed, at least 5 deg/s', 'extra:K-017, at least 5'])
  })

  it('called off covers nothing any more', () => {
    const id = announce()
    expect(endPlannedChange(plant.vault, plant.runa, id, { reason: 'old lids after all' })).toMatchObject({ endedBy: 'Runa Haldersen', endReason: 'old lids after all' })
    expect(codeOf(() => endPlannedChange(plant.vault, plant.runa, id, { reason: 'again' }))).toBe('already-ended')
    expect(state({ thrustLimit: 55 })).toBe('open')
  })

  it.each([
    ['an axis that is not there', { axisIds: [99] }, 'not-found'],
    ['a field that is none', { fields: ['thrustLimt'] }, 'input'],
    ['a range on words', { fields: ['homingMethod', 'move.label'] }, 'input'],
    ['a range upside down', { min: 60, max: 40 }, 'input'],
    ['a range of a field that it does not have', { ranges: [{ field: 'speedLimit', max: 9 }] }, 'input'],
    ['two ranges of one field', { ranges: [{ field: 'thrustLimit', max: 9 }, { field: 'thrustLimit', max: 8 }] }, 'input'],
    ['a range of its own upside down', { ranges: [{ field: 'thrustLimit', min: 60, max: 40 }] }, 'input'],
    ['a range of its own on words', { fields: ['homingMethod'], min: undefined, max: undefined, ranges: [{ field: 'homingMethod', max: 4 }] }, 'input'],
    ['a window upside down', { until: '2026-02-01T00:00:00Z' }, 'time-order'],
    ['a window that is over', { from: '2026-01-01T00:00:00Z', until: '2026-02-01T00:00:00Z' }, 'time-order'],
    ['someone who is not there', { allowedBy: 'person:99' }, 'input'],
  ])('is refused with %s', (_, parts, code) => expect(codeOf(() => announce(parts))).toBe(code))

  it('is seen only where all its axes are', () => {
    const other = plant.machineAt('Other works')
    const there = plant.axis('SECRET-9', { machineId: other.machineId })
    announce()
    const both = announce({ axisIds: [plant.axisId, there] })
    const bound = plant.person('Bound Planner', ['planner'], [plant.siteId])
    expect(listPlannedChanges(plant.vault, bound, {}).items.map(({ id }) => id)).toEqual([1])
    expect(codeOf(() => readPlannedChange(plant.vault, bound, both))).toBe('not-found')
    expect(codeOf(() => endPlannedChange(plant.vault, bound, both, { reason: 'r' }))).toBe('not-found')
    expect(listPlannedChanges(plant.vault, plant.ines, {}).items.map(({ id }) => id)).toEqual([2, 1])
  })
})
