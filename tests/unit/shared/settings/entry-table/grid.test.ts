import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { gridOf, roundDownToStep } from '../../../../../shared/settings/entry-table/grid'
import { readEntryFile } from '../../../../../shared/settings/entry-table/read-entry'
import type { EntryTable } from '../../../../../shared/settings/entry-table/schema'
import { writeEntryCsv } from '../../../../../shared/settings/entry-table/write-entry'
import { liftFile, liftPlate, liftTable } from '../../../../support/entry-table'

const grid = (section: string, field: string, row?: number, table: EntryTable = liftTable) => {
  const found = gridOf({ axisKind: 'linear', entryTable: table }, { section, field, ...row === undefined ? {} : { row } })
  return found && { step: found.step.toNumber(), digit: found.digit?.toNumber(), cuts: found.cuts }
}
const withParameter = (entry: EntryTable['parameters'][number]): EntryTable => ({ ...liftTable, parameters: [entry, ...liftTable.parameters] })

describe('the grid of a field', () => {
  it('is its step in the canonical unit', () => {
    expect(grid('setup', 'softLimitMin')).toEqual({ step: 0.1, digit: 0.1, cuts: false })
    // 0.005 m/s = 5 mm/s, three digits of m/s = 1 mm/s.
    expect(grid('setup', 'speedLimit')).toEqual({ step: 5, digit: 1, cuts: true })
  })

  it('is the last digit where that is coarser, or alone', () => {
    expect(grid('setup', 'thrustLimit', undefined, withParameter({ number: 'T', field: 'thrustLimit', step: 0.1, digits: 0 }))?.step).toBe(1)
    // One count is 0.25 %, one digit after the point of a count: 0.025 %.
    expect(grid('setup', 'thrustLimit', undefined, withParameter({ number: 'T', field: 'thrustLimit', factor: 0.25, digits: 1 }))).toEqual({ step: 0.025, digit: 0.025, cuts: false })
  })

  it('of a move is that of its column, unless the row has a number of its own', () => {
    const table = { ...withParameter({ number: 'V3', field: 'move:3:speed', step: 2 }), moves: liftTable.moves.map(column => column.field === 'speed' ? { ...column, step: 5 } : column) }
    expect(grid('move', 'speed', 7, table)?.step).toBe(5)
    expect(grid('move', 'speed', 3, table)?.step).toBe(2)
  })

  it('is not known without step and digits, without an entry, and of what is no number', () => {
    expect(grid('setup', 'inPositionWindow')?.digit).toBeUndefined()
    expect([grid('move', 'speed', 3), grid('setup', 'jogSpeed'), grid('setup', 'brakeFitted'), grid('extra', 'Ramp')]).toEqual([undefined, undefined, undefined, undefined])
    expect(gridOf({ axisKind: 'linear' }, { section: 'setup', field: 'speedLimit' })).toBeUndefined()
  })
})

describe('a limit drawn onto the step', () => {
  const place = { section: 'setup', field: 'speedLimit' }
  it('goes down, and stays where it stands on one', () => {
    expect(roundDownToStep(254.999, liftPlate, place)).toBe(250)
    expect(roundDownToStep(255, liftPlate, place)).toBe(255)
    expect(roundDownToStep(4.9, liftPlate, place)).toBe(0)
    expect(roundDownToStep(-2.59, liftPlate, { section: 'setup', field: 'softLimitMin' })).toBe(-2.5)
  })

  it('is as it was where no step is known', () => expect(roundDownToStep(33.333333, liftPlate, { section: 'setup', field: 'jogSpeed' })).toBe(33.333333))

  it('never grows, loses less than a step, and is what the drive’s list gives back', () => {
    fc.assert(fc.property(fc.integer({ min: 5_000_000, max: 900_000_000 }), (millionths) => {
      const value = millionths / 1_000_000
      const down = roundDownToStep(value, liftPlate, place)
      expect(down).toBeLessThanOrEqual(value)
      expect(value - down).toBeLessThan(5)
      expect(roundDownToStep(down, liftPlate, place)).toBe(down)
      const file = { ...liftFile, setup: { ...liftFile.setup, speedLimit: down } }
      const back = readEntryFile(new TextEncoder().encode(writeEntryCsv(file, liftPlate)), liftPlate, { exportedAt: file.exportedAt })
      expect(back.ok && back.value.content.setup.speedLimit).toBe(down)
    }), { numRuns: 40 })
  })
})
