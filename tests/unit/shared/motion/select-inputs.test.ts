import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { calledMove, highestMove, inputsOn, isCallable, selectCode, type Numbering } from '../../../../shared/motion/select-inputs'

const zero: Numbering = { firstMove: 0, allOff: 'first' }
const numbering = fc.record({ firstMove: fc.constantFrom(0 as const, 1 as const), allOff: fc.constantFrom('first' as const, 'none' as const, 'home' as const) })

describe('select inputs', () => {
  // Binary arithmetic: common practice, no source.
  it.each([[1, 1], [2, 3], [3, 7], [4, 15], [5, 31], [6, 63], [7, 127], [8, 255]])('%i inputs set the codes 0 to %i', (inputs, highest) => {
    expect(highestMove(inputs, zero)).toBe(highest)
    expect(isCallable(highest, inputs, zero)).toBe(true)
    expect(isCallable(highest + 1, inputs, zero)).toBe(false)
  })

  it('sets 5 = 101 and 13 = 1101', () => {
    expect(inputsOn(5)).toEqual([0, 2])
    expect(inputsOn(13)).toEqual([0, 2, 3])
    expect(inputsOn(0)).toEqual([])
  })

  it('sets every code from its own inputs, and no other', () => {
    for (let code = 0; code < 1024; code++) {
      expect(inputsOn(code).reduce((sum, input) => sum + 2 ** input, 0)).toBe(code)
      expect(inputsOn(code).length === 0 ? 0 : Math.max(...inputsOn(code)) + 1).toBe(code.toString(2).replace(/^0$/, '').length)
    }
  })

  it('keeps code 0 for nothing or home where the drive counts so', () => {
    expect(selectCode(4, { firstMove: 0, allOff: 'none' })).toBe(5)
    expect(selectCode(4, { firstMove: 1, allOff: 'first' })).toBe(3)
    expect(calledMove(0, { firstMove: 0, allOff: 'home' })).toBeUndefined()
    expect(isCallable(0, 3, { firstMove: 0, allOff: 'none' })).toBe(false)
    expect(isCallable(-1, 3, { firstMove: 1, allOff: 'first' })).toBe(false)
  })

  it('calls back the move that the code was made from, up to the highest', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 1023 }), fc.integer({ min: 1, max: 10 }), numbering, (move, inputs, how) => {
      expect(calledMove(selectCode(move, how), how)).toBe(move)
      expect(isCallable(selectCode(move, how), inputs, how)).toBe(move <= highestMove(inputs, how))
    }))
  })
})
