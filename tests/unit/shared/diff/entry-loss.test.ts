import { describe, expect, it } from 'vitest'
import { entryLoss } from '../../../../shared/diff/entry-loss'
import { serialToBeWritten } from '../../../../shared/settings/identity'
import { liftFile, liftPlate } from '../../../support/entry-table'

const loss = (part: Partial<typeof liftFile>) => entryLoss({ ...liftFile, ...part }, liftPlate)

describe('what the drive’s own list cannot hold', () => {
  it('is nothing for values on its steps', () => {
    expect(entryLoss(liftFile, liftPlate)).toEqual({ rounded: [], lost: [], fault: null })
  })

  it('is nothing where the serial is still to be written', () => {
    expect(loss({ unit: { serial: serialToBeWritten, model: 'LT10-100' } }).fault).toBeNull()
  })

  it('names numbers that the steps change', () => {
    const { rounded, lost } = loss({ setup: { ...liftFile.setup, softLimitMax: 184.56, speedLimit: 253 } })
    expect(rounded.map(({ field, before, after }) => [field, before, after])).toEqual([['softLimitMax', 184.56, 184.6], ['speedLimit', 253, 250]])
    expect(lost).toEqual([])
  })

  it('names what has no row or column', () => {
    const { lost } = loss({ setup: { ...liftFile.setup, jogSpeed: 25 }, moves: liftFile.moves.map(move => ({ ...move, deceleration: 900 })) })
    expect(lost.map(({ at }) => at)).toEqual(expect.arrayContaining(['/setup/jogSpeed']))
    expect(lost.filter(({ field }) => field === 'deceleration').map(({ row }) => row)).toEqual([0, 3])
  })

  it('lets a comment go that the drive has no place for', () => {
    expect(loss({ moves: liftFile.moves.map(move => ({ ...move, comment: 'by hand' })) }).lost).toEqual([])
  })

  it('says where the list cannot be read back', () => {
    const table = { ...liftPlate.entryTable, zones: liftPlate.entryTable.zones.map(column => column.field === 'zone' ? column : { ...column, step: 1 }) }
    expect(entryLoss({ ...liftFile, zones: [{ zone: 1, from: 10.1, to: 10.4 }] }, { ...liftPlate, entryTable: table }).fault).toMatchObject({ code: 'order' })
  })

  it('cannot be asked of a model without an entry table', () => {
    expect(() => entryLoss(liftFile, { model: 'LT20', axisKind: 'linear' })).toThrow(expect.objectContaining({ code: 'no-entry-table' }))
  })
})
