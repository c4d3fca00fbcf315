import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { targetInside } from '../../../../shared/checks/target-inside'
import { arbitraryContent } from '../../../support/arbitrary-content'
import { absolute, judgeInput, limits, linear, press, relative, rotary, told, unused } from '../../../support/check-input'

const inside = (...moves: Parameters<typeof linear>[1] & object) => told(targetInside, judgeInput(linear(limits, moves)))

describe('target-inside', () => {
  it('is silent for places between the limits and on them', () => {
    expect(inside(absolute(0, 0), absolute(1, 120.5), absolute(2, 198), press(3, 100, 150))).toEqual([])
  })

  it('says by how much a move ends beyond: 212.4 − 198 = 14.4 mm', () => {
    const input = judgeInput(linear(limits, [absolute(4, 10), absolute(5, 212.4)]))
    expect(told(targetInside, input)).toEqual(['stop: Move 5 ends at 212.4 mm, 14.4 mm beyond the soft limit of 198 mm.'])
    expect(targetInside.judge(input)).toMatchObject([{
      at: ['/moves/1/target', '/setup/softLimitMax'], values: { move: 5, end: 212.4, limit: 198, beyond: 14.4 },
    }])
  })

  it('counts the millionth of a millimetre next to the limit', () => {
    expect(inside(absolute(1, 198.000001))).toEqual(['stop: Move 1 ends at 198.000001 mm, 0.000001 mm beyond the soft limit of 198 mm.'])
    expect(inside(absolute(1, -0.000001))).toHaveLength(1)
  })

  it('holds the furthest place of a press inside as well', () => {
    expect(inside(press(7, 150, -2))).toEqual(['stop: Move 7 ends at −2 mm, 2 mm beyond the soft limit of 0 mm.'])
  })

  it('judges a relative move by its end where the row before it tells the start: 150 + 50 = 200 mm', () => {
    expect(inside(absolute(1, 150, { next: 2 }), relative(2, 48))).toEqual([])
    expect(inside(absolute(1, 150, { next: 2 }), relative(2, 50))).toEqual(['stop: Move 2 from 150 mm ends at 200 mm, 2 mm beyond the soft limit of 198 mm.'])
  })

  it('follows relative moves along the chain: 100 + 60 + 60 = 220 mm', () => {
    expect(inside(absolute(1, 100, { next: 2 }), relative(2, 60, { next: 3 }), relative(3, 60)))
      .toEqual(['stop: Move 3 from 160 mm ends at 220 mm, 22 mm beyond the soft limit of 198 mm.'])
  })

  it('judges each start of a row that several name', () => {
    // 190 + 10 = 200 is beyond, 150 + 10 = 160 is not.
    expect(inside(absolute(1, 150, { next: 3 }), absolute(2, 190, { next: 3 }), relative(3, 10)))
      .toEqual(['stop: Move 3 from 190 mm ends at 200 mm, 2 mm beyond the soft limit of 198 mm.'])
  })

  it('leaves a relative move with an unknown start to relative-step, and unused rows alone', () => {
    expect(inside(relative(1, 5000))).toEqual(['not applicable'])
    expect(inside(unused(9))).toEqual(['not applicable'])
  })

  it('judges by the one limit that is given and names the other', () => {
    const input = judgeInput(linear({ softLimitMax: 198 }, [absolute(1, 200), absolute(2, -500)]))
    expect(told(targetInside, input)).toEqual([
      'stop: Move 1 ends at 200 mm, 2 mm beyond the soft limit of 198 mm.',
      'unknown: Where the moves end cannot be judged without softLimitMin.',
    ])
    expect(targetInside.judge(input)[1]).toMatchObject({ missing: ['softLimitMin'], at: ['/moves/0/target', '/moves/1/target'] })
  })

  it('does not apply to a modulo axis that turns freely', () => {
    expect(told(targetInside, judgeInput(rotary({ modulo: 360 }, [absolute(1, 720)])))).toEqual(['not applicable'])
    expect(told(targetInside, judgeInput(rotary({ modulo: 360, softLimitMin: 0, softLimitMax: 350 }, [absolute(1, 355)])))).toHaveLength(1)
  })

  it('never stops more when a limit is moved outwards', () => {
    fc.assert(fc.property(arbitraryContent({ most: 12 }), fc.double({ min: 0, max: 1e6, noNaN: true }), (content, further) => {
      const { softLimitMin, softLimitMax } = content.setup
      const wider = { ...content, setup: {
        ...content.setup,
        ...softLimitMin === undefined ? {} : { softLimitMin: softLimitMin - further },
        ...softLimitMax === undefined ? {} : { softLimitMax: softLimitMax + further },
      } }
      const stops = (one: typeof content) => new Set(targetInside.judge(judgeInput(one)).filter(result => result.level === 'stop')
        .map(result => `${result.values.move} ${result.values.end}`))
      expect([...stops(wider)].filter(stop => !stops(content).has(stop))).toEqual([])
    }))
  })
})
