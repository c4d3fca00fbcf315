import { describe, expect, it } from 'vitest'
import { chainTarget } from '../../../../shared/checks/chain-target'
import { absolute, judgeInput, linear, told, unused } from '../../../support/check-input'

const chains = (...moves: Parameters<typeof linear>[1] & object) => told(chainTarget, judgeInput(linear({}, moves)))

describe('chain-target', () => {
  it('is silent where every follower is there, the row itself included', () => {
    expect(chains(absolute(0, 0, { next: 1 }), absolute(1, 5, { next: 1 }))).toEqual([])
  })

  it('stops a follower that does not exist or is an unused row', () => {
    expect(chains(absolute(0, 0, { next: 4 }), absolute(1, 5, { next: 9 }), unused(9))).toEqual([
      'stop: Move 0 is followed by move 4, which does not exist.',
      'stop: Move 1 is followed by move 9, which is an unused row.',
    ])
    expect(chainTarget.judge(judgeInput(linear({}, [absolute(0, 0), absolute(1, 0, { next: 4 })])))).toMatchObject([{ at: ['/moves/1/next'], values: { move: 1, next: 4 } }])
  })

  it('goes by numbers, not by places in the table: row 3 stands second', () => {
    expect(chains(absolute(0, 0, { next: 3 }), absolute(3, 5))).toEqual([])
    expect(chains(absolute(0, 0, { next: 1 }), absolute(3, 5))).toHaveLength(1)
  })

  it('does not apply where no used row has a follower', () => {
    expect(chains(absolute(0, 0), { ...unused(1), next: 7 })).toEqual(['not applicable'])
  })
})
