import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { timeline } from '../../../shared/motion/timeline'
import type { Nameplate } from '../../../shared/settings/nameplate'
import type { Content, Move } from '../../../shared/settings/types'
import { percentOf, positionLines, runsOf, showRun, speedLines, type RunContext } from '../../../utils/motion-runs'
import { axis, before, nameplate } from '../../support/axis-answers'

const context = (content: Content = before, plate: Nameplate | undefined = nameplate, duty: { moves: number[], cycleTime: number } | null = null): RunContext => ({ content, axis: { ...axis, duty }, nameplate: plate })
const run = (key: string, from: RunContext = context()) => {
  const found = runsOf(from).find(one => one.key === key)
  if (!found) throw new Error(`no run ${key}`)
  return found
}
const legOf = (key: string, from: RunContext = context()) => showRun(run(key, from), from).legs[0]

describe('the runs of an axis', () => {
  it('are its chains, then each move whose start is known', () => {
    expect(runsOf(context()).map(one => one.key)).toEqual(['chain 3', 'move 1', 'move 2', 'move 3', 'move 4', 'move 5', 'move 6', 'move 7'])
    expect(run('chain 3')).toMatchObject({ label: 'chain 3, 4, 5', from: 104, after: 2 })
    expect(run('move 1')).toMatchObject({ label: 'move 1, Over lid', from: 5, after: 0 })
  })

  it('begin with the duty, which begins where it ends; one that names a row that is not there is none', () => {
    expect(runsOf(context(before, nameplate, { moves: [1, 2, 0], cycleTime: 4000 }))[0]).toMatchObject({ key: 'duty', from: 5, after: undefined })
    expect(runsOf(context(before, nameplate, { moves: [1, 99], cycleTime: 4000 }))[0]?.key).toBe('chain 3')
  })

  it('begin an endless chain where it ends', () => {
    const endless: Content = { ...before, moves: [{ move: 0, kind: 'absolute', target: 10, speed: 100, acceleration: 1000, next: 1 }, { move: 1, kind: 'absolute', target: 60, speed: 100, acceleration: 1000, next: 0 }] }
    expect(runsOf(context(endless))[0]).toMatchObject({ label: 'chain 0, 1, without end', from: 60, after: undefined })
  })
})

describe('the mean of a run', () => {
  const plate: Nameplate = { ...nameplate, movingMass: 1, rotorInertia: 0, lead: 10 }
  it('is told of a chain and of the duty, in the words of the rule; a single move does not come again', () => {
    const duty = context(before, plate, { moves: [1, 0], cycleTime: 4000 })
    expect(showRun(run('duty', duty), duty).mean).toMatchObject({ time: 4, from: 5, sentence: expect.stringMatching(/^The duty needs [\d.]+ N in the mean over 4 s, [\d.]+ % of the rated 640 N\.$/) })
    const { mean } = showRun(run('chain 3', context(before, plate)), context(before, plate))
    // Begun again where it ends, at 5 mm, and not at 104 where the picture begins.
    expect(mean).toMatchObject({ from: 5, sentence: expect.stringMatching(/^Moves 3 to 5, if begun again and again, need [\d.]+ N in the mean/) })
    expect(showRun(run('move 1', context(before, plate)), context(before, plate)).mean).toBeUndefined()
  })

  it('is not told where the rated thrust is not known', () => {
    const { ratedThrust: _, ...rest } = plate
    const unrated = context(before, { ...rest, forceBase: 'peak-thrust' })
    expect(showRun(run('chain 3', unrated), unrated).mean).toBeUndefined()
  })
})

describe('a run over time', () => {
  it('strings its legs without gaps, to the same end as the timeline', () => {
    fc.assert(fc.property(fc.array(fc.integer({ min: 0, max: 7 }), { minLength: 1, maxLength: 12 }), (numbers) => {
      const from = context(before, nameplate, { moves: numbers, cycleTime: 4000 })
      const duty = run('duty', from)
      const { legs, course, thrust } = showRun(duty, from)
      const whole = timeline(duty.moves, duty.from, { setup: before.setup })
      expect(legs.map(leg => leg.move.move)).toEqual(numbers)
      expect(legs.reduce((sum, leg) => sum + leg.takes, 0)).toBeCloseTo(whole.seconds, 9)
      expect(course.duration).toBe(whole.seconds)
      for (const [index, leg] of legs.entries()) {
        expect(leg.from).toBeCloseTo(index === 0 ? duty.from : legs[index - 1]?.to ?? NaN, 9)
        expect(leg.begins).toBeCloseTo(legs.slice(0, index).reduce((sum, one) => sum + one.takes, 0), 9)
      }
      expect(thrust?.pieces.map(piece => piece.t0.toFixed(6))).toEqual(whole.stretches.map(stretch => stretch.t0.toFixed(6)))
    }), { numRuns: 40 })
  })

  it('finds the thrust nearest to its limit: by hand for a load that hangs', () => {
    // Plus points down (−90°): F = m·ẍ − m·g + sign(ẋ)·Ff with m = 6.5 kg, Ff = 25 N; g = 9.80665: weight 63.743 N.
    // Braking on the way down: 6.5 · (−2) − 63.743 + 25 = −51.743; speeding up: 13 − 63.743 + 25 = −25.743; holding: −63.743 N.
    // Move 1 has no dwell, so that braking is the worst: 51.743 N of 38 % · 640 = 243.2 N towards minus.
    const own = { ...nameplate, movingMass: 0 }
    const leg = legOf('move 1', context(before, own))
    expect(leg?.thrust?.need).toBeCloseTo(51.743225, 6)
    expect(leg?.thrust?.limit).toBeCloseTo(243.2, 9)
    expect(leg?.thrust && percentOf(leg.thrust)).toBe(22)
  })

  it('counts a press up to its approach, and lets it hold with its force limit towards its part', () => {
    const press: Move = { move: 2, kind: 'press', target: 104, approach: 88, speed: 180, acceleration: 1500, forceLimit: 32, dwell: 500 }
    const content: Content = { ...before, moves: before.moves.map(move => move.move === 2 ? press : move) }
    const { thrust } = showRun(run('move 2', context(content)), context(content))
    const hold = thrust?.pieces.at(-1)
    // 32 % of 640 N.
    expect([hold?.least, hold?.most, hold?.plus]).toEqual([204.8, 204.8, 204.8])
    expect(hold?.minus).toBeCloseTo(243.2, 9)
    expect(thrust?.pieces[0]?.plus).toBeCloseTo(243.2, 9)
    expect(hold && hold.t1 - hold.t0).toBeCloseTo(0.5, 9)
  })

  it('says what is missing where thrust cannot be told, and draws the motion all the same', () => {
    const { payloadMass: _mass, ...setup } = before.setup
    const from = context({ ...before, setup })
    const shown = showRun(run('move 1', from), from)
    expect([shown.thrust, shown.missing]).toEqual([undefined, ['payloadMass']])
    expect(shown.course.duration).toBeCloseTo(0.353, 9)
    expect(shown.legs[0]?.thrust).toBeUndefined()
  })

  it('has no share of a limit that there is not', () => {
    const { thrustLimit: _limit, ...setup } = before.setup
    const { peakThrust: _peak, ...plate } = nameplate
    const leg = legOf('move 1', context({ ...before, setup }, plate))
    expect(leg?.thrust?.limit).toBe(Infinity)
    expect([percentOf({ need: 10, limit: Infinity }), percentOf({ need: 10, limit: 0 }), percentOf({ need: 100.2, limit: 100 }), percentOf({ need: 100, limit: 100 })]).toEqual([undefined, undefined, 101, 100])
  })
})

describe('lines across the pictures', () => {
  it('are the limits that the motion comes near, and where presses begin to push', () => {
    const { course } = showRun(run('move 1'), context())
    expect(speedLines(before, course)).toEqual([{ at: 400, word: 'speed limit' }])
    expect(speedLines({ ...before, setup: { ...before.setup, speedLimit: 501 } }, course)).toEqual([])
    expect(positionLines(before, run('move 1'), course)).toEqual([{ at: 2, word: 'soft limit', side: 'right' }])
    expect(positionLines({ ...before, setup: { ...before.setup, softLimitsActive: false } }, run('move 1'), course)).toEqual([])
    const press = showRun(run('move 2'), context())
    expect(positionLines(before, run('move 2'), press.course)).toEqual([{ at: 88, word: 'press approach' }])
  })
})
