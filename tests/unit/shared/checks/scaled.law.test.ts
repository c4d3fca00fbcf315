import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { brakeVertical } from '../../../../shared/checks/brake-vertical'
import { chainAfterPress } from '../../../../shared/checks/chain-after-press'
import { forceRescale } from '../../../../shared/checks/force-rescale'
import { startTiming } from '../../../../shared/checks/start-timing'
import { targetGrid } from '../../../../shared/checks/target-grid'
import { twinMoves } from '../../../../shared/checks/twin-moves'
import { windowGrid } from '../../../../shared/checks/window-grid'
import { zoneReach } from '../../../../shared/checks/zone-reach'
import type { CheckResult } from '../../../../shared/checks/types'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, rotary } from '../../../support/check-input'

/*
 * Laws of the rules about sizes: what is ten times as large all over is judged alike, and verdicts agree with counting by
 * whole numbers, where nothing is rounded.
 */

const whole = (least: number, most: number) => fc.integer({ min: least, max: most })
const brief = (results: readonly CheckResult[]) => results.map(({ level, at }) => `${level} ${at.join()}`)

describe('counts and windows', () => {
  const counts = fc.record({ window: whole(1, 60), count: whole(1, 25), repeats: whole(1, 40), target: whole(-5000, 5000) })
  const input = ({ window, count, repeats, target }: { window: number, count: number, repeats: number, target: number }, unit: number) =>
    judgeInput(linear({ inPositionWindow: window / unit }, [absolute(1, target / unit)]), { nameplate: plate({ resolution: count / unit, repeatability: repeats / unit }) })

  it('are judged alike in metres, millimetres and micrometres', () => {
    fc.assert(fc.property(counts, (all) => {
      for (const rule of [windowGrid, targetGrid]) {
        const told = [1, 10, 1000].map(unit => brief(rule.judge(input(all, unit))))
        expect(told[1]).toEqual(told[0])
        expect(told[2]).toEqual(told[0])
      }
    }))
  })

  it('agree with counting in whole thousandths', () => {
    fc.assert(fc.property(counts, (all) => {
      const { window, count, repeats, target } = all
      expect(windowGrid.judge(input(all, 1000)).length).toBe(Number(window < 2 * count || window < repeats))
      // Doubled, so that half a window stays whole.
      const rest = ((target % count) + count) % count
      const off = Math.min(rest, count - rest)
      expect(targetGrid.judge(input(all, 1000)).length).toBe(Number(2 * off > Math.min(window, 2 * repeats)))
    }))
  })

  it('forgive no more on coarser counts: a window that is too fine stays so', () => {
    fc.assert(fc.property(counts, whole(1, 20), (all, coarser) => {
      if (windowGrid.judge(input(all, 1000)).length > 0) expect(windowGrid.judge(input({ ...all, count: all.count + coarser }, 1000))).toHaveLength(1)
    }))
  })
})

describe('the brake', () => {
  const load = fc.record({ payloadMass: whole(0, 60), movingMass: whole(0, 20), frictionForce: whole(0, 300), brakeHolding: whole(1, 900), mountingAngle: whole(-90, 90), brakeEngageDelay: whole(0, 80) })
  const judged = (one: typeof load extends fc.Arbitrary<infer Value> ? Value : never, times: number, more: Setup = {}) => {
    const setup: Setup = {
      payloadMass: one.payloadMass * times, frictionForce: one.frictionForce * times, mountingAngle: one.mountingAngle, brakeEngageDelay: one.brakeEngageDelay,
      brakeFitted: true, onEnableLoss: 'stop-and-release', ...more,
    }
    const input = judgeInput(linear(setup), { nameplate: plate({ movingMass: one.movingMass * times, brakeHolding: one.brakeHolding * times, brakeFitted: true, brakeCloseTime: 40 }) })
    return brakeVertical.applies(input) ? brakeVertical.judge(input) : []
  }

  it('judges a machine of twice the weight, friction and brake alike', () => {
    fc.assert(fc.property(load, (one) => {
      expect(brief(judged(one, 2))).toEqual(brief(judged(one, 1)))
    }))
  })

  it('is asked of a load that slides, and of no other: m·g·s against friction, in newtons', () => {
    fc.assert(fc.property(load, (one) => {
      const pull = (one.payloadMass + one.movingMass) * 9.80665 * Math.abs(Math.sin(one.mountingAngle * Math.PI / 180))
      const slides = pull > one.frictionForce
      expect(judged(one, 1, { brakeFitted: false }).map(({ level }) => level)).toEqual(slides ? ['stop'] : [])
      expect(judged(one, 1).map(({ level }) => level)).toEqual(slides ? [...one.brakeEngageDelay < 40 ? ['stop'] : [], ...one.brakeHolding < 1.5 * pull ? ['warn'] : []] : [])
    }))
  })

  it('of a tilted table is asked by the unbalance as of a slide by its weight', () => {
    fc.assert(fc.property(whole(1, 90), whole(1, 50), whole(0, 50), (mountingAngle, unbalanceTorque, frictionTorque) => {
      const input = judgeInput(rotary({ mountingAngle, unbalanceTorque, frictionTorque, brakeFitted: false, onEnableLoss: 'release' }))
      expect(brakeVertical.judge(input).length).toBe(Number(unbalanceTorque * Math.sin(mountingAngle * Math.PI / 180) > frictionTorque))
    }))
  })
})

describe('start signals and zones', () => {
  it('are never told to be too short once they are longer', () => {
    fc.assert(fc.property(whole(0, 30), whole(0, 30), whole(0, 20), whole(0, 20), (settle, longer, inputFilterTime, controllerScan) => {
      const told = (selectSettleTime: number) => startTiming.judge(judgeInput(linear({ selectInputs: 3, selectSettleTime, startPulseTime: 100 }),
        { nameplate: plate({ inputFilterTime }), axis: { axisKind: 'linear', flags: [], controllerScan } })).length
      expect(told(settle + longer)).toBeLessThanOrEqual(told(settle))
      expect(told(settle)).toBe(Number(settle < inputFilterTime + controllerScan || settle < 4))
    }))
  })

  it('are missed by a controller that looks too seldom: the zone is shorter than the way of one scan', () => {
    fc.assert(fc.property(whole(1, 40), whole(1, 900), whole(1, 100), (width, speed, controllerScan) => {
      const content = linear({ softLimitMin: 0, softLimitMax: 100 }, [absolute(1, 50, { speed })], { zones: [{ zone: 1, from: 10, to: 10 + width }] })
      // mm · 1000 against mm/s · ms.
      expect(zoneReach.judge(judgeInput(content, { axis: { axisKind: 'linear', flags: [], controllerScan } })).length).toBe(Number(width * 1000 < speed * controllerScan))
    }))
  })
})

describe('rows', () => {
  const row = (move: number): fc.Arbitrary<Move> => fc.record({
    kind: fc.constantFrom('absolute', 'relative', 'press'), target: fc.constantFrom(10, 20), speed: fc.constantFrom(100, 250),
    deceleration: fc.constantFrom(undefined, 2000, 3000), label: fc.constantFrom(undefined, 'Up', 'Down'), next: fc.constantFrom(undefined, 0, 1),
  }).map(({ kind, target, ...more }) => kind === 'press' ? press(move, 5, target, more) : kind === 'relative' ? relative(move, target, more) : absolute(move, target, more))
  const table = fc.tuple(row(0), row(1), row(2), row(3), row(4), row(5)).map(rows => [...rows])

  it('are twins just where no field but number and words tells them apart, two by two', () => {
    const differs = (one: Move, other: Move) => (['kind', 'target', 'speed', 'acceleration', 'forceLimit', 'approach', 'pressSpeed', 'next'] as const).some(name => one[name] !== other[name])
      || (one.deceleration ?? one.acceleration) !== (other.deceleration ?? other.acceleration)
    fc.assert(fc.property(table, (moves) => {
      const twins = moves.filter(one => moves.some(other => other.move !== one.move && !differs(one, other))).map(({ move }) => move)
      expect(twinMoves.judge(judgeInput(linear({}, moves))).flatMap(({ values }) => values.moves)).toEqual(twins)
    }))
  })

  it('that follow a press are noted once for each press that leads on', () => {
    fc.assert(fc.property(table, (moves) => {
      const leading = moves.filter(({ kind, next }) => kind === 'press' && next !== undefined).map(({ move }) => move)
      expect(chainAfterPress.judge(judgeInput(linear({}, moves))).map(({ values }) => values.move)).toEqual(leading)
    }))
  })
})

describe('percentages of another unit', () => {
  it('are told just where the two bases differ, by the factor from one to the other and back', () => {
    fc.assert(fc.property(whole(1, 3000), whole(1, 3000), (one, other) => {
      const told = (forceBase: number, ratedThrust: number) => forceRescale.judge(judgeInput(linear({ thrustLimit: 50 }), { nameplate: plate({ ratedThrust }), broughtFrom: { forceBase, rescaled: false } }))
      const there = told(one, other)
      const back = told(other, one)
      expect(there.length).toBe(Number(one !== other))
      if (there[0] && back[0]) expect(Number(there[0].values.factor) * Number(back[0].values.factor)).toBeCloseTo(1, 12)
    }))
  })
})
