import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { sisterMatrix, sisterOutlier, type Sister } from '../../../../../shared/checks/live/sister-outlier'
import { diffRenumbered } from '../../../../../shared/diff/renumber'
import type { Content, Setup } from '../../../../../shared/settings/types'
import { absolute, linear, press, tell } from '../../../../support/check-input'

const sister = (content: Content, index: number): Sister => ({ tag: `LID-0${index + 1}.Z`, content, flags: [] })
const sisters = (...contents: Content[]) => contents.map(sister)
const thrusts = (...limits: (number | undefined)[]) => sisters(...limits.map(thrustLimit => linear({ thrustLimit })))
const said = (list: readonly Sister[]) => sisterOutlier.judge(list).map(tell)

describe('sister-outlier', () => {
  it('is silent where all agree', () => {
    expect(said(thrusts(38, 38, 38, 38, 38, 38))).toEqual([])
  })

  it('warns of the one of six that is not as five others are', () => {
    const list = thrusts(38, 55, 38, 38, 38, 38)
    expect(said(list)).toEqual(['warn: LID-02.Z: thrust limit is 55 %, while 5 sister axes have 38 %.'])
    expect(sisterOutlier.judge(list)).toMatchObject([{
      rule: 'sister-outlier', at: ['/setup/thrustLimit'], axes: ['LID-02.Z'], values: { fields: ['thrustLimit'], value: 55, common: 38, agreeing: 5 },
    }])
  })

  it('takes four that agree and one in five that does not for enough, and no less', () => {
    expect(said(thrusts(38, 38, 38, 38, 55))).toHaveLength(1)
    // Three that agree are too few, and two of six are more than one in five.
    expect(said(thrusts(38, 38, 38, 55))).toEqual([])
    expect(said(thrusts(38, 38, 38, 38, 55, 55))).toEqual([])
    expect(said(thrusts(38, 38, 38, 38, 38, 38, 38, 38, 55, 60))).toHaveLength(2)
    expect(said(thrusts(38, 38, 38, 38, 38, 38, 38, 55, 60))).toEqual([])
  })

  it('counts what is not set for a value like any other', () => {
    expect(said(thrusts(38, 38, undefined, 38, 38))).toEqual(['warn: LID-03.Z: thrust limit is not set, while 4 sister axes have 38 %.'])
    expect(said(thrusts(undefined, undefined, undefined, undefined, 38))).toEqual(['warn: LID-05.Z: thrust limit is 38 %, while 4 sister axes have none.'])
    expect(sisterOutlier.judge(thrusts(38, 38, undefined, 38, 38))[0]!.at).toEqual([])
  })

  it('tells a move that one of them lacks once, and compares its other fields among those that have it', () => {
    const full = linear({}, [absolute(1, 10), press(2, 100, 150)])
    expect(said(sisters(full, full, full, full, linear({}, [absolute(1, 10)])))).toEqual(['warn: LID-05.Z: move 2 kind is not set, while 4 sister axes have press.'])
    const harder = linear({}, [absolute(1, 10), press(2, 100, 150, { forceLimit: 45 })])
    expect(said(sisters(full, full, full, full, harder))).toEqual(['warn: LID-05.Z: move 2 force is 45 %, while 4 sister axes have 30 %.'])
    const zoned = (to: number) => linear({}, [], { zones: [{ zone: 1, from: 0, to }] })
    expect(said(sisters(zoned(12), zoned(12), zoned(12), zoned(12), linear()))).toEqual(['warn: LID-05.Z: zone 1 from is not set, while 4 sister axes have 0 mm.'])
    expect(said(sisters(zoned(12), zoned(12), zoned(12), zoned(12), zoned(13)))).toEqual(['warn: LID-05.Z: zone 1 to is 13 mm, while 4 sister axes have 12 mm.'])
  })

  it('makes one line of a row that differs in several values', () => {
    const full = linear({}, [press(2, 100, 150)])
    const list = sisters(full, full, full, linear({}, [press(2, 90, 150, { forceLimit: 45 })]), full)
    expect(said(list)).toEqual(['warn: LID-04.Z: move 2 force and move 2 approach are not as on 4 sister axes.'])
    expect(sisterOutlier.judge(list)).toMatchObject([{
      at: ['/moves/0/forceLimit', '/moves/0/approach'], values: { fields: ['move 2 forceLimit', 'move 2 approach'], agreeing: 4, axes: ['LID-04.Z'] },
    }])
  })

  describe('where a row was put in', () => {
    const flagged = (...contents: Content[]) => sisters(...contents).map((one): Sister => ({ ...one, flags: ['gravity'] }))
    const pairsOf = (model: Content, content: Content) => diffRenumbered(model, content)?.pairs
    const paired = (list: readonly Sister[]) => sisterOutlier.judge(list, {}, pairsOf).map(tell)
    const table = [absolute(1, 10, { next: 2 }), absolute(2, 45, { next: 3 }), press(3, 100, 150, { next: 4 }), absolute(4, 0)]
    const common = linear({}, table)
    const put = (force: number) => linear({}, [absolute(1, 10, { next: 3 }), absolute(2, 77), absolute(3, 45, { next: 4 }), press(4, 100, 150, { next: 5, forceLimit: force }), absolute(5, 0)])

    it('tells that row and not those that it moved on, whose followers moved with them', () => {
      expect(paired(flagged(common, common, put(30), common, common))).toEqual(['warn: LID-03.Z: move 2 (added) kind is absolute, while 4 sister axes have none.'])
    })

    it('tells an edit behind it by both numbers', () => {
      const list = flagged(common, common, put(45), common, common)
      expect(paired(list)).toEqual([
        'warn: LID-03.Z: move 4 (3 on the others) force is 45 %, while 4 sister axes have 30 %.',
        'warn: LID-03.Z: move 2 (added) kind is absolute, while 4 sister axes have none.',
      ])
      expect(sisterOutlier.judge(list, {}, pairsOf).map(({ at }) => at)).toEqual([['/moves/3/forceLimit'], ['/moves/1/kind']])
    })

    it('tells as much wherever the axis stands in the list', () => {
      expect(paired(flagged(put(30), common, common, common, common))).toEqual(['warn: LID-01.Z: move 2 (added) kind is absolute, while 4 sister axes have none.'])
    })

    it('tells the row that one of them lacks once, and the follower that is another therefore', () => {
      const less = linear({}, [absolute(1, 10, { next: 2 }), press(2, 100, 150, { next: 3 }), absolute(3, 0)])
      expect(paired(flagged(common, common, less, common, common))).toEqual([
        'warn: LID-03.Z: move 1 then is 3, while 4 sister axes have 2.',
        'warn: LID-03.Z: move 2 kind is not set, while 4 sister axes have absolute.',
      ])
    })
  })

  it('looks past place, taught and motion values', () => {
    const own = (softLimitMax: number, homeOffset: number, jerk: number): Setup => ({ softLimitMax, homeOffset, jerk, homingMethod: 'index-pulse' })
    expect(said(sisters(...[1, 2, 3, 4].map(() => linear(own(198, 0, 5))), linear(own(150, 3, 9))))).toEqual([])
  })

  it('does not call a home offset missing that is merely taught on that axis', () => {
    const stop = linear({ homingMethod: 'hard-stop', homeOffset: 1 })
    expect(said(sisters(stop, stop, stop, stop, linear({ homingMethod: 'absolute-encoder', homeOffset: 7 }))))
      .toEqual(['warn: LID-05.Z: method is absolute-encoder, while 4 sister axes have hard-stop.'])
    expect(said(sisters(stop, stop, stop, stop, linear({ homingMethod: 'hard-stop', homeOffset: 7 }))))
      .toEqual(['warn: LID-05.Z: home offset is 7 mm, while 4 sister axes have 1 mm.'])
  })

  it('looks at the motion of all where one of them carries a flag', () => {
    const at = (target: number) => linear({}, [absolute(1, target)])
    const list = sisters(at(10), at(10), at(10), at(10), at(20))
    expect(said(list)).toEqual([])
    expect(said(list.map((one, index) => index === 0 ? { ...one, flags: ['gravity'] as const } : one)))
      .toEqual(['warn: LID-05.Z: move 1 target is 20 mm, while 4 sister axes have 10 mm.'])
  })

  it('has nothing to go by among no or few sisters: the unknown case of a live rule', () => {
    expect(said([])).toEqual([])
    expect(said(thrusts(38, 55))).toEqual([])
  })

  it('fills a row for each field that any of them has, the odd one marked', () => {
    const list = sisters(linear({ thrustLimit: 38 }), linear({ thrustLimit: 38, jogSpeed: 25 }), linear({ thrustLimit: 38 }), linear({ thrustLimit: 38 }), linear({ thrustLimit: 55 }))
    expect(sisterMatrix(list)).toEqual([
      { key: 'thrustLimit', words: 'thrust limit', values: [38, 38, 38, 38, 55], texts: ['38 %', '38 %', '38 %', '38 %', '55 %'], odd: [4] },
      { key: 'jogSpeed', words: 'jog speed', values: [undefined, 25, undefined, undefined, undefined], texts: ['', '25 mm/s', '', '', ''], odd: [1] },
    ])
  })

  it('never calls more than one in five odd, nor any of those that agree', () => {
    fc.assert(fc.property(fc.array(fc.constantFrom(38, 38, 38, 38, 38, 40, 55), { maxLength: 15 }), (limits) => {
      const [row] = sisterMatrix(thrusts(...limits))
      const odd = row?.odd ?? []
      expect(odd.length * 5).toBeLessThanOrEqual(limits.length)
      const others = limits.filter((_, index) => !odd.includes(index))
      if (odd.length > 0) {
        expect(others.length).toBeGreaterThanOrEqual(4)
        expect(new Set(others).size).toBe(1)
      }
    }))
  })
})
