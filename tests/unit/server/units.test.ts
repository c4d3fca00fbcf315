import fc from 'fast-check'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Vault } from '../../../server/database/client'
import { listFittings } from '../../../server/services/axes/read-axis'
import { registerAxis } from '../../../server/services/places/axes'
import { endFitting, openFitting } from '../../../server/services/units/fittings'
import { changeUnit, listUnits, readUnit, registerUnit } from '../../../server/services/units/units'
import { codeOf } from '../../support/codes'
import { personActor, smallPlant } from '../../support/plant'
import { freshVault } from '../../support/vault'

let vault: Vault
let remove: () => void
let plant: ReturnType<typeof smallPlant>
beforeEach(() => {
  ({ vault, remove } = freshVault({ clock: () => Date.parse('2026-03-10T12:00:00Z') }))
  plant = smallPlant(vault)
})
afterEach(() => { remove() })
const fit = (at: string, unitId = plant.unitId, axisId = plant.axisId) => openFitting(vault, plant.planner, { axisId, unitId, at }).id

describe('a unit', () => {
  it('is known by serial without case and by channel', () => {
    expect(codeOf(() => registerUnit(vault, plant.planner, { serial: 'a4471', model: 'HL40-200V' }))).toBe('taken')
    expect(registerUnit(vault, plant.planner, { serial: 'a4471', channel: 1, model: 'HL40-200V' }).id).toBeGreaterThan(plant.unitId)
    expect(readUnit(vault, plant.unitId)).toMatchObject({ serial: 'A4471', channel: null, state: 'spare', axis: null, modelKnown: false })
  })

  it('becomes fitted by a fitting, and by nothing else', () => {
    expect(codeOf(() => registerUnit(vault, plant.planner, { serial: 'B1', model: 'HR16', state: 'fitted' }))).toBe('not-fitted')
    expect(codeOf(() => changeUnit(vault, plant.planner, plant.unitId, { rev: 1, state: 'fitted' }))).toBe('not-fitted')
    fit('2026-03-03T06:10:00Z')
    expect(readUnit(vault, plant.unitId)).toMatchObject({ state: 'fitted', axis: { id: plant.axisId, tag: 'LID-02.Z' }, siteId: plant.siteId, rev: 2 })
    expect(codeOf(() => changeUnit(vault, plant.planner, plant.unitId, { rev: 2, state: 'scrapped' }))).toBe('fitted')
    expect(changeUnit(vault, plant.planner, plant.unitId, { rev: 2, firmware: '2.14' })).toMatchObject({ firmware: '2.14', state: 'fitted' })
  })

  it('is found by any part of serial, model, location or actuator, without case', () => {
    registerUnit(vault, plant.planner, { serial: 'C-900', model: 'HR16', location: 'Cabinet 4, shelf B', actuatorSerial: 'ACT-77' })
    const found = (search: string) => listUnits(vault, plant.planner, { search }).items.map(({ serial }) => serial)
    expect(found('shelf b')).toEqual(['C-900'])
    expect(found('act-7')).toEqual(['C-900'])
    expect(found('hl40')).toEqual(['A4471'])
    expect(found('%')).toEqual([])
    expect(listUnits(vault, plant.planner, { state: 'spare' }).items).toHaveLength(2)
    expect(listUnits(vault, plant.planner, { model: 'HR16' }).items).toHaveLength(1)
  })

  it('of another site is not listed, one of no site is', () => {
    fit('2026-03-03T06:10:00Z')
    registerUnit(vault, plant.planner, { serial: 'Free', model: 'HR16' })
    const bound = personActor(vault, 'Ada Lindqvist', ['planner'], [plant.siteId + 100])
    expect(listUnits(vault, bound, {}).items.map(({ serial }) => serial)).toEqual(['Free'])
    expect(codeOf(() => openFitting(vault, bound, { axisId: plant.axisId, unitId: plant.unitId, at: '2026-03-04T00:00:00Z' }))).toBe('not-found')
  })
})

describe('fittings', () => {
  it('are ended with what the unit is then', () => {
    const id = fit('2026-03-03T07:10:00+01:00')
    expect(endFitting(vault, plant.planner, id, { at: '2026-03-09T02:00:00Z', unitState: 'failed' })).toEqual({
      id, axisId: plant.axisId, axisTag: 'LID-02.Z', unitId: plant.unitId, serial: 'A4471', from: '2026-03-03T06:10:00.000Z', to: '2026-03-09T02:00:00.000Z',
    })
    expect(readUnit(vault, plant.unitId)).toMatchObject({ state: 'failed', axis: null })
    expect(codeOf(() => endFitting(vault, plant.planner, id, { at: '2026-03-09T02:00:00Z', unitState: 'failed' }))).toBe('already-ended')
  })

  it('never overlap, on the axis or of the unit', () => {
    fit('2026-03-03T06:10:00Z')
    const second = registerUnit(vault, plant.planner, { serial: 'B2', model: 'HL40-200V' }).id
    const otherAxis = registerAxis(vault, plant.planner, { machineId: plant.machineId, tag: 'LID-03.Z', axisKind: 'linear' }).id
    expect(codeOf(() => fit('2026-03-05T00:00:00Z', second))).toBe('overlaps')
    expect(codeOf(() => fit('2026-01-05T00:00:00Z', second))).toBe('overlaps')
    expect(codeOf(() => fit('2026-03-05T00:00:00Z', plant.unitId, otherAxis))).toBe('overlaps')
    expect(readUnit(vault, second).state).toBe('spare')
  })

  it('may follow one another at the very instant', () => {
    const first = fit('2026-03-03T06:10:00Z')
    endFitting(vault, plant.planner, first, { at: '2026-03-09T02:00:00Z', unitState: 'repair' })
    const second = registerUnit(vault, plant.planner, { serial: 'B2', model: 'HL40-200V' }).id
    fit('2026-03-09T02:00:00Z', second)
    expect(listFittings(vault, plant.axisId).items.map(({ serial }) => serial)).toEqual(['B2', 'A4471'])
  })

  it('lie in the past and end after they began', () => {
    expect(codeOf(() => fit('2026-03-10T12:11:00Z'))).toBe('time-order')
    const id = fit('2026-03-10T12:09:00Z')
    expect(codeOf(() => endFitting(vault, plant.planner, id, { at: '2026-03-10T12:08:59Z', unitState: 'spare' }))).toBe('time-order')
  })

  it('refuse by trigger exactly what a plain reading of the intervals refuses', () => {
    const hour = (value: number) => new Date(Date.UTC(2026, 0, 1, value)).toISOString()
    const interval = fc.record({ from: fc.integer({ min: 0, max: 20 }), length: fc.option(fc.integer({ min: 1, max: 8 })), axis: fc.integer({ min: 1, max: 2 }), unit: fc.integer({ min: 1, max: 2 }) })
    fc.assert(fc.property(fc.array(interval, { minLength: 1, maxLength: 8 }), (wanted) => {
      const { vault: each, remove: drop } = freshVault()
      each.sqlite.pragma('foreign_keys = OFF')
      const insert = each.sqlite.prepare('INSERT INTO fitting (axis_id, unit_id, from_at, to_at, made_at) VALUES (?, ?, ?, ?, ?)')
      const kept: { from: number, to: number, axis: number, unit: number }[] = []
      for (const { from, length, axis, unit } of wanted) {
        const to = length === null ? Infinity : from + length
        const clash = kept.some(other => (other.axis === axis || other.unit === unit) && other.from < to && from < other.to)
        let stored = true
        try {
          insert.run(axis, unit, hour(from), length === null ? null : hour(to), hour(0))
        }
        catch (error) {
          expect(String(error)).toContain('overlaps')
          stored = false
        }
        expect(stored).toBe(!clash)
        if (stored) kept.push({ from, to, axis, unit })
      }
      drop()
    }), { numRuns: 25 })
  })

  it('change in no other way than by being closed', () => {
    const id = fit('2026-03-03T06:10:00Z')
    for (const set of [`axis_id = 99`, `unit_id = 99`, `from_at = '2026-01-01T00:00:00.000Z'`, `made_at = '2026-01-01T00:00:00.000Z'`]) {
      expect(() => vault.sqlite.exec(`UPDATE fitting SET ${set}, to_at = '2026-03-09T00:00:00.000Z' WHERE id = ${id}`), set).toThrow(/opened once/)
    }
    endFitting(vault, plant.planner, id, { at: '2026-03-09T02:00:00Z', unitState: 'spare' })
    expect(() => vault.sqlite.exec(`UPDATE fitting SET to_at = NULL WHERE id = ${id}`)).toThrow(/opened once/)
    expect(() => vault.sqlite.exec(`UPDATE fitting SET to_at = '2026-03-09T01:00:00.000Z' WHERE id = ${id}`)).toThrow(/opened once/)
    expect(() => vault.sqlite.exec(`DELETE FROM fitting WHERE id = ${id}`)).toThrow(/never deleted/)
  })
})
