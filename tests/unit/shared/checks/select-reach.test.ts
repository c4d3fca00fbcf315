import { describe, expect, it } from 'vitest'
import { selectReach } from '../../../../shared/checks/select-reach'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import { absolute, judgeInput, linear, plate, told, unused } from '../../../support/check-input'

const table = (...numbers: number[]) => numbers.map(number => absolute(number, 0))
const reach = (selectInputs: number | undefined, moves = table(0, 4, 7, 8, 20), more: Partial<Nameplate> = {}) =>
  judgeInput(linear({ selectInputs }, moves), { nameplate: plate(more) })

// 2^n codes, 0 … 2^n − 1: binary arithmetic, common practice, no source.
describe('select-reach', () => {
  it('is silent up to the highest code: 5 inputs reach 31, 3 inputs 7', () => {
    expect(told(selectReach, reach(5))).toEqual([])
    expect(told(selectReach, reach(3, table(0, 7)))).toEqual([])
  })

  it('says what the line that is not wired would call instead: 8 is 1000, 20 is 10100; with three inputs 000 and 100', () => {
    const input = reach(3)
    expect(told(selectReach, input)).toEqual([
      'warn: Moves 8 and 20 cannot be called: 3 select inputs reach up to move 7; 8 without its line 4 calls move 0 and 20 without its line 5 calls move 4.',
    ])
    expect(selectReach.judge(input)).toMatchObject([{
      at: ['/setup/selectInputs', '/moves/3', '/moves/4'], values: { highest: 7, moves: [8, 20], inputs: 3, instead: ['move 0', 'move 4'] },
    }])
  })

  it('counts from the first move of the drive: with 1 as first, 3 inputs reach 8, and move 0 has no code', () => {
    expect(told(selectReach, reach(3, table(1, 8), { firstMove: 1 }))).toEqual([])
    expect(told(selectReach, reach(3, table(9), { firstMove: 1 }))).toEqual(['warn: Move 9 cannot be called: 3 select inputs reach up to move 8; 9 without its line 4 calls nothing.'])
    expect(told(selectReach, reach(3, table(0), { firstMove: 1 }))).toEqual(['warn: Move 0 cannot be called: 3 select inputs reach up to move 8.'])
  })

  it('keeps code 0 free where all inputs off call nothing or home: codes 1 … 7 are moves 0 … 6', () => {
    expect(told(selectReach, reach(3, table(0, 6), { allOff: 'none' }))).toEqual([])
    expect(told(selectReach, reach(3, table(0, 7), { allOff: 'none' })))
      .toEqual(['warn: Move 7 cannot be called: 3 select inputs reach up to move 6; 7 without its line 4 calls nothing.'])
    expect(told(selectReach, reach(3, table(0, 7), { allOff: 'home' }))[0]).toMatch(/7 without its line 4 calls home/)
    expect(told(selectReach, reach(3, table(0), { allOff: 'none', firstMove: 1 }))[0]).toMatch(/Move 0 cannot be called: 3 select inputs reach up to move 7/)
  })

  it('agrees with counting all codes, for 1 to 10 inputs', () => {
    for (let inputs = 1; inputs <= 10; inputs++) {
      const past = 2 ** inputs
      expect(told(selectReach, reach(inputs, table(past - 1)))).toEqual([])
      if (past <= 1023) expect(selectReach.judge(reach(inputs, table(past)))[0]!.values).toMatchObject({ highest: past - 1, moves: [past] })
    }
  })

  it('exempts followers and unused rows, but not a row that only follows itself', () => {
    expect(told(selectReach, reach(1, [absolute(0, 0, { next: 5 }), absolute(5, 0), unused(9)]))).toEqual([])
    expect(told(selectReach, reach(1, [absolute(0, 0), absolute(5, 0, { next: 5 })]))).toHaveLength(1)
  })

  it('tells at most four one by one, and how many more there are', () => {
    const four = '2 without its line 2 calls move 0, 3 without its line 2 calls move 1, 4 without its line 3 calls move 0'
    const said = (last: number) => told(selectReach, reach(1, table(0, 1, ...Array.from({ length: last - 1 }, (_, k) => k + 2))))[0]
    expect(said(5)).toBe(`warn: Moves 2 to 5 cannot be called: 1 select input reaches up to move 1; ${four} and 5 without its line 3 calls move 1.`)
    expect(said(6)).toBe(`warn: Moves 2 to 6 cannot be called: 1 select input reaches up to move 1; ${four}, 5 without its line 3 calls move 1 and so on for 1 more.`)
    expect(said(7)).toMatch(/5 without its line 3 calls move 1 and so on for 2 more\.$/)
  })

  it('does not apply where moves are called over the bus', () => {
    expect(told(selectReach, reach(0))).toEqual(['not applicable'])
    expect(told(selectReach, reach(undefined))).toEqual(['not applicable'])
  })

  it('takes 0 as first move and all off as the first without a nameplate', () => {
    expect(told(selectReach, judgeInput(linear({ selectInputs: 3 }, table(0, 7))))).toEqual([])
  })
})
