import { describe, expect, it } from 'vitest'
import { relativeStep } from '../../../../shared/checks/relative-step'
import { absolute, judgeInput, limits, linear, press, relative, rotary, told } from '../../../support/check-input'

const steps = (...moves: Parameters<typeof linear>[1] & object) => told(relativeStep, judgeInput(linear(limits, moves)))

describe('relative-step', () => {
  it('notes how often a step fits: 198 / 20 = 9.9, so 9 times', () => {
    const input = judgeInput(linear(limits, [relative(3, -20)]))
    expect(told(relativeStep, input)).toEqual(['note: Move 3, a step of −20 mm, fits 9 times into the 198 mm between the soft limits.'])
    expect(relativeStep.judge(input)).toMatchObject([{ at: ['/moves/0/target'], values: { move: 3, step: -20, span: 198, fits: 9 } }])
  })

  it('warns of a step that fits once: 198 / 99.000001 is just below 2, 198 / 99 is 2', () => {
    expect(steps(relative(3, 99.000001))).toEqual(['warn: Move 3, a step of 99.000001 mm, fits only once into the 198 mm between the soft limits.'])
    expect(steps(relative(3, 99))[0]).toMatch(/^note: .* 2 times/)
    expect(steps(relative(3, 198))[0]).toMatch(/^warn: /)
  })

  it('stops a step that fits not even once: 198.000001 on 198 mm', () => {
    expect(steps(relative(3, 198.000001))).toEqual(['stop: Move 3, a step of 198.000001 mm, is longer than the 198 mm between the soft limits.'])
    expect(relativeStep.judge(judgeInput(linear(limits, [relative(3, 250)])))[0]!.values.fits).toBe(0)
  })

  it('counts 0.3 / 0.1 as three, which doubles make 2.9999999999999996', () => {
    expect(told(relativeStep, judgeInput(linear({ softLimitMin: 0, softLimitMax: 0.3 }, [relative(1, 0.1)])))[0]).toMatch(/fits 3 times/)
  })

  it('names missing limits', () => {
    expect(told(relativeStep, judgeInput(linear({ softLimitMin: 0 }, [relative(1, 5)])))).toEqual(['unknown: How often a relative step fits cannot be judged without softLimitMax.'])
  })

  it('does not apply without steps, nor to an axis that turns freely', () => {
    expect(steps(absolute(1, 5), relative(2, 0))).toEqual(['not applicable'])
    expect(told(relativeStep, judgeInput(rotary({ modulo: 360 }, [relative(1, 90, { next: 1 })])))).toEqual(['not applicable'])
  })

  describe('an endless chain of relative moves', () => {
    const stops = (...moves: Parameters<typeof linear>[1] & object) => steps(...moves).filter(line => line.startsWith('stop'))

    it('names the lap that leaves: 50 mm a lap from 0 mm is at 150 after three, and the fourth would end at 200', () => {
      const input = judgeInput(linear(limits, [relative(1, 50, { next: 1 })]))
      expect(told(relativeStep, input)[0]).toBe('stop: Move 1 repeats without end, 50 mm further each lap: lap 4 at the latest leaves the soft limits.')
      expect(relativeStep.judge(input)[0]).toMatchObject({ values: { moves: [1], net: 50, lap: 4, span: 198 } })
    })

    it('counts the way there and back within a lap: +60 −20 nets 40, and from 0 the laps peak at 60, 100, 140, 180 and 220', () => {
      expect(stops(relative(1, 60, { next: 2 }), relative(2, -20, { next: 1 })))
        .toEqual(['stop: Moves 1 and 2 repeat without end, 40 mm further each lap: lap 5 at the latest leaves the soft limits.'])
    })

    it('counts from where the chain is entered: from 100 the laps peak at 160 and 200', () => {
      expect(stops(absolute(0, 100, { next: 1 }), relative(1, 60, { next: 2 }), relative(2, -20, { next: 1 })))
        .toEqual(['stop: Moves 1 and 2 repeat without end, 40 mm further each lap: lap 2 leaves the soft limits.'])
    })

    it('stops towards minus alike: −50 mm from 198 mm', () => {
      expect(stops(relative(1, -50, { next: 1 }))[0]).toMatch(/−50 mm further each lap: lap 4 at the latest/)
    })

    it('is silent where the lap comes back, or one member goes to a place of its own', () => {
      expect(stops(relative(1, 50, { next: 2 }), relative(2, -50, { next: 1 }))).toEqual([])
      expect(stops(relative(1, 50, { next: 2 }), absolute(2, 0, { next: 1 }))).toEqual([])
      expect(stops(relative(1, 50, { next: 2 }), press(2, 100, 150, { next: 1 }))).toEqual([])
    })

    it('stops without limits too, since every travel ends somewhere', () => {
      expect(told(relativeStep, judgeInput(linear({}, [relative(1, 5, { next: 1 })])))).toEqual([
        'stop: Move 1 repeats without end, 5 mm further each lap: sooner or later the axis leaves its travel.',
        'unknown: How often a relative step fits cannot be judged without softLimitMin and softLimitMax.',
      ])
    })
  })
})
