import { describe, expect, it } from 'vitest'
import { pressPath } from '../../../../shared/checks/press-path'
import { absolute, judgeInput, limits, linear, press, relative, rotary, told, unused } from '../../../support/check-input'

type Moves = Parameters<typeof linear>[1] & object
const paths = (...moves: Moves) => told(pressPath, judgeInput(linear(limits, moves)))
const known = (start: number, approach: number, target: number) => paths(absolute(1, start, { next: 2 }), press(2, approach, target))

describe('press-path', () => {
  it('is silent for 50 → 100 → 150 and for 190 → 150 → 100: either way round is right', () => {
    expect(known(50, 100, 150)).toEqual([])
    expect(known(190, 150, 100)).toEqual([])
  })

  it('lets a press start on its approach, and not a millionth beyond', () => {
    expect(known(100, 100, 150)).toEqual([])
    expect(known(100.000001, 100, 150)).toEqual(['stop: Press 2 starts at 100.000001 mm, 0.000001 mm beyond its approach of 100 mm.'])
  })

  it('stops a start beyond the approach: 120 − 100 = 20 mm', () => {
    const input = judgeInput(linear(limits, [absolute(1, 120, { next: 2 }), press(2, 100, 150)]))
    expect(told(pressPath, input)).toEqual(['stop: Press 2 starts at 120 mm, 20 mm beyond its approach of 100 mm.'])
    expect(pressPath.judge(input)).toMatchObject([{ at: ['/moves/1/approach'], values: { move: 2, start: 120, approach: 100, target: 150 } }])
  })

  it('stops a target on the near side of the approach: from 0 over 100 back to 50 the start lies 100 mm too far on', () => {
    expect(known(0, 100, 50)).toEqual(['stop: Press 2 starts at 0 mm, 100 mm beyond its approach of 100 mm.'])
  })

  it('stops an approach that is the target', () => {
    expect(paths(press(2, 100, 100))).toEqual(['stop: Press 2 has approach and target at 100 mm: no way is left to press on.'])
  })

  it('wants both places inside the limits, the limits included', () => {
    expect(known(50, 100, 198)).toEqual([])
    expect(known(50, 199, 205)).toEqual([
      'stop: Press 2 slows down at 199 mm, 1 mm beyond the soft limit of 198 mm.',
      'stop: Press 2 may run on to 205 mm, 7 mm beyond the soft limit of 198 mm.',
    ])
  })

  it('lists the absolute moves that end between approach and target where the start is not known', () => {
    // Between 100 (not included: a start there is right) and 150 (included) lie 120 and 150.
    const input = judgeInput(linear(limits, [absolute(1, 120), absolute(2, 100), absolute(3, 150), absolute(4, 160), press(5, 100, 150), unused(9)]))
    expect(told(pressPath, input)).toEqual([
      'unknown: Press 5 must not start between its approach of 100 mm and its target of 150 mm, and where it starts is not known: moves 1 and 3 end there.',
    ])
    expect(pressPath.judge(input)).toMatchObject([{
      missing: ['start of press'], values: { between: [1, 3] }, at: ['/moves/4/approach', '/moves/0/target', '/moves/2/target'],
    }])
    expect(paths(press(5, 150, 100))[0]).toMatch(/no absolute move ends there/)
  })

  it('stays unknown where one of several rows before it ends nobody knows where', () => {
    expect(paths(absolute(1, 50, { next: 3 }), relative(2, 10, { next: 3 }), press(3, 100, 150))[0]).toMatch(/^unknown: Press 3/)
  })

  it('takes the end of a chain as start: 50 + 40 + 40 = 130, 30 mm beyond', () => {
    expect(paths(absolute(1, 50, { next: 2 }), relative(2, 40, { next: 3 }), relative(3, 40, { next: 4 }), press(4, 100, 150)))
      .toEqual(['stop: Press 4 starts at 130 mm, 30 mm beyond its approach of 100 mm.'])
  })

  it('names missing limits beside what it can judge', () => {
    expect(told(pressPath, judgeInput(linear({}, [absolute(1, 50, { next: 2 }), press(2, 100, 150)]))))
      .toEqual(['unknown: The path of a press cannot be judged without softLimitMin and softLimitMax.'])
  })

  it('asks no limits of an axis that turns freely, and does not apply without a press', () => {
    expect(told(pressPath, judgeInput(rotary({ modulo: 360 }, [absolute(1, 50, { next: 2 }), press(2, 400, 450)])))).toEqual([])
    expect(paths(absolute(1, 50))).toEqual(['not applicable'])
  })
})
