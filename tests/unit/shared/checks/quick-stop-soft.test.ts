import { describe, expect, it } from 'vitest'
import { quickStopSoft } from '../../../../shared/checks/quick-stop-soft'
import { absolute, judgeInput, linear, rotary, told, unused } from '../../../support/check-input'

const quick = (quickStopDeceleration: number | undefined, ...moves: Parameters<typeof linear>[1] & object) =>
  judgeInput(linear({ quickStopDeceleration }, moves))

describe('quick-stop-soft', () => {
  it('is silent where the quick stop is harder, or as hard, as every move', () => {
    expect(told(quickStopSoft, quick(5000, absolute(1, 0, { deceleration: 3000 }), absolute(2, 0)))).toEqual([])
    expect(told(quickStopSoft, quick(3000, absolute(1, 0, { deceleration: 3000 })))).toEqual([])
  })

  it('warns of the hardest move: 1000 against 3000 mm/s²', () => {
    const input = quick(1000, absolute(1, 0), absolute(5, 0, { deceleration: 3000 }))
    expect(told(quickStopSoft, input)).toEqual(['warn: The quick stop brakes with 1000 mm/s², softer than move 5 with 3000 mm/s²: give it at least as much.'])
    expect(quickStopSoft.judge(input)).toMatchObject([{ at: ['/setup/quickStopDeceleration', '/moves/1/deceleration'], values: { move: 5, quickStop: 1000, deceleration: 3000 } }])
  })

  it('lets a quick stop just as hard pass, and not a millionth softer', () => {
    expect(told(quickStopSoft, quick(3000, absolute(1, 0, { deceleration: 3000 })))).toEqual([])
    expect(quickStopSoft.judge(quick(2999.999999, absolute(1, 0, { deceleration: 3000 })))).toMatchObject([{ level: 'warn', values: { quickStop: 2999.999999, deceleration: 3000 } }])
  })

  it('takes the acceleration where a move has no deceleration, and skips unused rows', () => {
    const input = quick(1999.999999, absolute(1, 0), unused(2))
    expect(quickStopSoft.judge(input)[0]!.at).toEqual(['/setup/quickStopDeceleration', '/moves/0/acceleration'])
    // 9000 up and 100 down: it is the braking that counts.
    expect(told(quickStopSoft, quick(500, absolute(1, 0, { acceleration: 9000, deceleration: 100 })))).toEqual([])
  })

  it('names the lowest number of several as hard', () => {
    expect(quickStopSoft.judge(quick(500, absolute(7, 0), absolute(3, 0), absolute(5, 0)))[0]!.values.move).toBe(3)
  })

  it('speaks in degrees on a rotary axis', () => {
    expect(told(quickStopSoft, judgeInput(rotary({ quickStopDeceleration: 100 }, [absolute(1, 0)])))[0]).toMatch(/100 deg\/s², softer than move 1 with 2000 deg\/s²/)
  })

  it('names the quick stop where it is not given', () => {
    expect(told(quickStopSoft, quick(undefined, absolute(1, 0)))).toEqual(['unknown: The quick stop cannot be judged without quickStopDeceleration.'])
  })

  it('does not apply without moves', () => {
    expect(told(quickStopSoft, quick(5, unused(1)))).toEqual(['not applicable'])
  })
})
