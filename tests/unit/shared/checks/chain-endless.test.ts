import { describe, expect, it } from 'vitest'
import { chainEndless } from '../../../../shared/checks/chain-endless'
import { absolute, judgeInput, linear, press, relative, told } from '../../../support/check-input'

const chains = (...moves: Parameters<typeof linear>[1] & object) => told(chainEndless, judgeInput(linear({}, moves)))

describe('chain-endless', () => {
  it('is silent for a chain that ends', () => {
    expect(chains(absolute(0, 0, { next: 1 }), absolute(1, 5))).toEqual([])
  })

  it('names the moves of the loop, not those that lead into it', () => {
    const input = judgeInput(linear({}, [absolute(0, 0, { next: 6 }), absolute(5, 10, { next: 7 }), absolute(6, 20, { next: 5 }), absolute(7, 30, { next: 6 })]))
    expect(told(chainEndless, input)).toEqual(['note: Moves 5 to 7 repeat without end.'])
    expect(chainEndless.judge(input)).toMatchObject([{ values: { moves: [5, 7, 6] }, at: ['/moves/1/next', '/moves/3/next', '/moves/2/next'] }])
  })

  it('tells two loops apart', () => {
    expect(chains(absolute(0, 0, { next: 1 }), absolute(1, 5, { next: 0 }), relative(2, 5, { next: 2 })))
      .toEqual(['note: Moves 0 and 1 repeat without end.', 'note: Move 2 repeats without end.'])
  })

  it('warns where a lap takes no time: nothing travels and nothing waits', () => {
    expect(chains(absolute(3, 50, { next: 3 }))).toEqual(['warn: Move 3 repeats without end in a lap of 0 ms: give one a dwell.'])
    expect(chains(absolute(3, 50, { next: 4, dwell: 0 }), relative(4, 0, { next: 5 }), press(5, 40, 50, { next: 3 }))[0]).toMatch(/^warn: Moves 3 to 5/)
  })

  it('only notes it where a lap takes a millisecond or a millionth of a millimetre', () => {
    expect(chains(absolute(3, 50, { next: 3, dwell: 1 }))[0]).toMatch(/^note/)
    expect(chains(absolute(3, 50, { next: 4 }), absolute(4, 50.000001, { next: 3 }))[0]).toMatch(/^note/)
    expect(chains(relative(3, 0.000001, { next: 4 }), relative(4, -0.000001, { next: 3 }))[0]).toMatch(/^note/)
  })

  it('does not apply without followers', () => {
    expect(chains(absolute(0, 0))).toEqual(['not applicable'])
  })
})
