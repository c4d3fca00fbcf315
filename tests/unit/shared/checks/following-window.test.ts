import { describe, expect, it } from 'vitest'
import { followingWindow } from '../../../../shared/checks/following-window'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, relative, rotary, told, unused } from '../../../support/check-input'

const window = (setup: Setup, moves: readonly Move[] = [absolute(1, 100)], nameplate = plate({ hardMargin: 1 })) =>
  judgeInput(linear({ followingErrorWindow: 5, inPositionWindow: 0.1, positionGain: 100, ...setup }, moves), { nameplate })

describe('following-window', () => {
  it('is silent where it is wider than band and lag: 250/100 = 2.5 mm', () => {
    expect(told(followingWindow, window({}))).toEqual([])
  })

  it('warns up to the lag, that included: 250/50 = 5 mm', () => {
    const input = window({ positionGain: 50 })
    expect(told(followingWindow, input)).toEqual(['warn: The following error window of ±5 mm is not wider than the 5 mm that the axis lags in move 1 at 250 mm/s: the drive stops it.'])
    expect(followingWindow.judge(input)).toMatchObject([{ at: ['/setup/followingErrorWindow', '/moves/0/speed', '/setup/positionGain'], values: { window: 5, lag: 5, speed: 250, move: 1 } }])
    expect(told(followingWindow, window({ positionGain: 50.1 }))).toEqual([])
  })

  it('lags less with feed-forward: 250/20·(1 − 0.85) = 1.875 mm, and not at all with all of it', () => {
    expect(told(followingWindow, window({ positionGain: 20, velocityFeedForward: 85 }))).toEqual([])
    expect(told(followingWindow, window({ positionGain: 20, velocityFeedForward: 85, followingErrorWindow: 1.8 }))[0]).toMatch(/the 1.875 mm that the axis lags/)
    expect(told(followingWindow, window({ positionGain: 1, velocityFeedForward: 100 }))).toEqual([])
    expect(told(followingWindow, window({ positionGain: 1, velocityFeedForward: 120 }))).toEqual([])
  })

  it('goes by the fastest move, at the speed that it reaches', () => {
    // 5 mm at 3000 mm/s²: 122.47 of 900 mm/s; the other does 300 mm/s.
    const moves = [relative(1, 5, { speed: 900, acceleration: 3000 }), absolute(2, 0, { speed: 300 })]
    expect(followingWindow.judge(window({ positionGain: 50 }, moves))[0]!.values).toMatchObject({ move: 2, lag: 6, speed: 300 })
  })

  it('names the lowest number of several as fast', () => {
    expect(followingWindow.judge(window({ positionGain: 50 }, [absolute(7, 0), absolute(3, 0), absolute(5, 0)]))[0]!.values.move).toBe(3)
  })

  it('warns up to the in-position window, that included', () => {
    expect(told(followingWindow, window({ inPositionWindow: 5 }))).toEqual(['warn: The following error window of ±5 mm is not wider than the in-position window of ±5 mm.'])
    expect(told(followingWindow, window({ inPositionWindow: 4.999999 }))).toEqual([])
  })

  it('notes one that is wider than the room to the hard stop: 0 − (−1.5) = 1.5 below, 200.5 − 198 = 2.5 mm above', () => {
    const placed = { homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 1.5, softLimitMin: 0, softLimitMax: 198 } as const
    expect(told(followingWindow, window(placed))).toEqual(['note: The following error window of ±5 mm is wider than the 1.5 mm from soft limit to hard stop: the axis is there before the drive notices.'])
    expect(told(followingWindow, window({ ...placed, followingErrorWindow: 1.5, positionGain: 1000 }))).toEqual([])
    expect(told(followingWindow, window({ ...placed, softLimitMin: undefined }))[0]).toMatch(/wider than the 2.5 mm/)
    expect(told(followingWindow, window({ ...placed, homingMethod: 'limit-switch' }))).toEqual([])
    // A limit beyond the hard stop is another rule's to tell.
    expect(told(followingWindow, window({ ...placed, softLimitMin: -3 }))).toEqual([])
  })

  it('names what is missing', () => {
    expect(told(followingWindow, window({ followingErrorWindow: undefined }))).toEqual(['unknown: The following error window cannot be judged without followingErrorWindow.'])
    expect(told(followingWindow, window({ inPositionWindow: undefined, positionGain: undefined }))).toEqual(['unknown: The following error window cannot be judged without inPositionWindow and positionGain.'])
    expect(told(followingWindow, window({ positionGain: 0 }))).toEqual(['unknown: The following error window cannot be judged without positionGain.'])
  })

  it('speaks in degrees, and of no lag where nothing moves', () => {
    expect(told(followingWindow, judgeInput(rotary({ followingErrorWindow: 2, inPositionWindow: 0.1, positionGain: 100 }, [absolute(1, 5)])))[0]).toMatch(/±2 deg is not wider than the 2.5 deg .* at 250 deg\/s/)
    expect(told(followingWindow, window({ positionGain: 1 }, [relative(1, 0)]))).toEqual([])
  })

  it('does not apply without moves', () => {
    expect(told(followingWindow, window({}, [unused(1)]))).toEqual(['not applicable'])
  })
})
