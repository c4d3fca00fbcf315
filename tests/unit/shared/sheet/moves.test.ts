import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isCallable, selectCode } from '../../../../shared/motion/select-inputs'
import { contentOf } from '../../../../shared/settings/content'
import { moveFieldNames } from '../../../../shared/settings/move-fields'
import type { Content, Move } from '../../../../shared/settings/types'
import { sheetMoves } from '../../../../shared/sheet/moves'
import { formatNumber } from '../../../../shared/units/number'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { liftFile, liftPlate } from '../../../support/entry-table'
import { lidPress } from '../../../support/lid-press'

const move = (number: number, more: Partial<Move> = {}): Move => ({ move: number, kind: 'absolute', target: 5, speed: 250, acceleration: 2000, ...more })
const content = (moves: readonly Move[], selectInputs?: number): Content => ({ axisKind: 'linear', setup: selectInputs === undefined ? {} : { selectInputs }, zones: [], extra: {}, moves })
const bits = (moves: readonly Move[], inputs: number, nameplate = {}) => sheetMoves({ content: content(moves, inputs), nameplate: { model: 'HL', axisKind: 'linear', stroke: 200, ...nameplate } })
  .rows.map(({ call }) => (call.by === 'inputs' ? call.on.map(Number).join('') : call.by))

describe('the inputs of a move', () => {
  // Binary, input 1 weighs 1, the highest stands first: common practice, no source.
  it('are its code in binary', () => expect(bits([move(0), move(1), move(2), move(5), move(7)], 3)).toEqual(['000', '001', '010', '101', '111']))
  it('count from the first move', () => expect(bits([move(1), move(2), move(8)], 3, { firstMove: 1 })).toEqual(['000', '001', '111']))
  it('leave the code 0 free where all off calls nothing', () => expect(bits([move(0), move(6), move(7)], 3, { allOff: 'none' })).toEqual(['001', '111', 'nothing']))
  it('are none for what follows by itself out of reach, and for what no input reaches', () => expect(bits([move(1, { next: 9 }), move(9), move(8)], 3)).toEqual(['001', 'itself', 'nothing']))
  it('are none where moves are called over the bus', () => expect(bits([move(0), move(1, { next: 0 })], 0)).toEqual(['itself', 'bus']))

  it('a row that only follows itself, or an empty one, is called like any other', () => {
    expect(bits([move(3, { next: 3 })], 0)).toEqual(['bus'])
    expect(bits([move(9, { next: 9 })], 3)).toEqual(['nothing'])
    expect(bits([move(1, { next: 2, speed: 0, acceleration: 0 }), move(2)], 0)).toEqual(['bus', 'bus'])
  })

  it('read as a binary number are the code again', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 1023 }), fc.integer({ min: 1, max: 10 }), fc.constantFrom(0 as const, 1 as const), fc.constantFrom('first' as const, 'none' as const), (number, inputs, firstMove, allOff) => {
      const [word] = bits([move(number)], inputs, { firstMove, allOff })
      const code = selectCode(number, { firstMove, allOff })
      expect(word).toBe(isCallable(code, inputs, { firstMove, allOff }) ? code.toString(2).padStart(inputs, '0') : 'nothing')
    }))
  })
})

describe('the move table of a sheet', () => {
  it('has the columns that are filled, units in their heads', () => {
    const { columns, rows } = sheetMoves({ content: contentOf(lidPress()) })
    expect(columns.map(({ field, unit }) => `${field} ${unit}`.trim())).toEqual(['label', 'kind', 'target mm', 'speed mm/s', 'acceleration mm/s²', 'forceLimit %', 'approach mm', 'next', 'dwell ms'])
    expect(rows).toHaveLength(8)
    expect(rows[2]?.cells).toEqual(['Seat lid', 'press', '104', '180', '1500', '32', '88', '', ''])
  })

  it('writes the drive’s own numbers, with the word beside a code', () => {
    const { columns, rows } = sheetMoves({ content: contentOf(liftFile), nameplate: liftPlate })
    expect(columns.map(({ unit }) => unit)).toEqual(['', '', '× 0.01 mm', 'mm/s', 'm/s²', '%', 'mm', ''])
    expect(rows.map(({ cells }) => cells.join('|'))).toEqual(['|A absolute|500|250|2|||', 'Press|P press|15025|100|2,5|38|120|0'])
  })

  it('tells rows that are kept empty, and keeps comments', () => {
    const [empty, used] = sheetMoves({ content: content([move(0, { speed: 0, acceleration: 0, target: 0 }), move(1, { comment: 'after the jar' })]) }).rows
    expect([empty?.unused, used?.unused, used?.comment]).toEqual([true, false, 'after the jar'])
  })

  it('holds every value of every move of any content', () => {
    fc.assert(fc.property(arbitraryContent(), (given) => {
      const { columns, rows } = sheetMoves({ content: given })
      expect(rows.map(row => row.move)).toEqual(given.moves.map(row => row.move))
      given.moves.forEach((row, index) => {
        const texts = moveFieldNames.filter(name => name !== 'comment' && row[name] !== undefined)
        for (const name of texts) {
          const value = row[name]
          const text = typeof value === 'number' ? formatNumber(value).replace(/^-/, '−') : String(value)
          expect(rows[index]?.cells[columns.findIndex(column => column.field === name)], `${row.move} ${name}`).toBe(text)
        }
      })
    }))
  })
})
