import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { homeSide } from '../../../../shared/checks/home-side'
import { polarityFlip } from '../../../../shared/checks/polarity-flip'
import { travelPlaced } from '../../../../shared/checks/travel-placed'
import type { CheckResult, Rule } from '../../../../shared/checks/types'
import { zoneReach } from '../../../../shared/checks/zone-reach'
import type { Content, Move, Setup, Zone } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, plate, press, relative, rotary } from '../../../support/check-input'

/*
 * Laws of the rules about places: moving the zero or turning the axis round changes nothing that a person would see, and
 * what they say agrees with walking along the axis millimetre by millimetre.
 */

const whole = (least: number, most: number) => fc.integer({ min: least, max: most })
const zone = (number: number) => fc.record({ from: whole(-60, 140), length: whole(1, 40) }).map(({ from, length }): Zone => ({ zone: number, from, to: from + length }))
const axis: fc.Arbitrary<Content> = fc.record({
  min: whole(-40, 40), span: whole(1, 90), homeOffset: whole(-60, 60), homingDirection: fc.constantFrom('negative' as const, 'positive' as const), zones: fc.tuple(zone(1), zone(2), zone(3)),
}).map(({ min, span, homeOffset, homingDirection, zones }) => linear(
  { softLimitMin: min, softLimitMax: min + span, homingMethod: 'hard-stop', homingDirection, homeOffset }, [absolute(1, min)], { zones },
))
const nameplate = plate({ stroke: 80, hardMargin: 2 })
const placeRules: readonly Rule[] = [travelPlaced, homeSide, zoneReach]
const judged = (content: Content) => placeRules.flatMap(rule => rule.judge(judgeInput(content, { nameplate })))
const brief = (results: readonly CheckResult[]) => results.map(({ rule, level, values }) => `${level} ${rule} ${String(values.beyond ?? values.inside ?? values.zone)}`).sort()

const shifted = (content: Content, by: number): Content => {
  const { softLimitMin = 0, softLimitMax = 0, homeOffset = 0 } = content.setup
  return {
    ...content,
    // Home reads the negative offset: it moves the other way.
    setup: { ...content.setup, softLimitMin: softLimitMin + by, softLimitMax: softLimitMax + by, homeOffset: homeOffset - by },
    zones: content.zones.map(one => ({ ...one, from: one.from + by, to: one.to + by })),
  }
}
const turnedRound = (content: Content): Content => {
  const { softLimitMin = 0, softLimitMax = 0, homeOffset = 0, homingDirection } = content.setup
  const setup: Setup = { ...content.setup, softLimitMin: 0 - softLimitMax, softLimitMax: 0 - softLimitMin, homeOffset: 0 - homeOffset, homingDirection: homingDirection === 'negative' ? 'positive' : 'negative' }
  return { ...content, setup, zones: content.zones.map(one => ({ ...one, from: 0 - one.to, to: 0 - one.from })) }
}

describe('another zero', () => {
  it('changes no verdict about ends, home and zones', () => {
    fc.assert(fc.property(axis, whole(-500, 500), (content, by) => {
      expect(brief(judged(shifted(content, by)))).toEqual(brief(judged(content)))
    }))
  })
})

describe('the axis seen from its other end', () => {
  it('is told the same about ends, home and zones', () => {
    fc.assert(fc.property(axis, (content) => {
      expect(brief(judged(turnedRound(content)))).toEqual(brief(judged(content)))
    }))
  })

  it('is its own mirror image: turned round twice it is as before, and turned round once nothing runs astray', () => {
    fc.assert(fc.property(axis, (content) => {
      expect(turnedRound(turnedRound(content))).toEqual(content)
      const before = { ...content, setup: { ...content.setup, positiveDirection: 'extend' as const } }
      const mirrored = turnedRound(content)
      const after = { ...mirrored, setup: { ...mirrored.setup, positiveDirection: 'retract' as const }, moves: content.moves.map(move => ({ ...move, target: 0 - move.target })) }
      expect(polarityFlip.judge(judgeInput(after, { before: { content: before } }))).toEqual([])
    }))
  })
})

describe('walking along the axis', () => {
  it('finds no place between the soft limits outside the stroke just where travel-placed is silent', () => {
    fc.assert(fc.property(axis, (content) => {
      const { softLimitMin = 0, softLimitMax = 0, homeOffset = 0, homingDirection } = content.setup
      // From home: a margin of 2 mm, 80 mm of stroke, a margin of 2 mm.
      const away = homingDirection === 'negative' ? 1 : -1
      const stroke = new Set(Array.from({ length: 81 }, (_, step) => -homeOffset + away * (2 + step)))
      let inside = true
      for (let place = softLimitMin; place <= softLimitMax; place++) inside &&= stroke.has(place)
      expect(travelPlaced.judge(judgeInput(content, { nameplate })).length === 0).toBe(inside)
    }))
  })

  it('meets home only at or beyond the limits just where home-side is silent', () => {
    fc.assert(fc.property(axis, (content) => {
      const { softLimitMin = 0, softLimitMax = 0, homeOffset = 0, homingDirection } = content.setup
      const ahead = homingDirection === 'negative' ? -1 : 1
      // Going on from the limit on the side of homing, home is met sooner or later, or it was passed before.
      const limit = ahead === -1 ? softLimitMin : softLimitMax
      const met = Array.from({ length: 500 }, (_, step) => limit + ahead * step).includes(0 - homeOffset)
      expect(homeSide.judge(judgeInput(content)).length === 0).toBe(met)
    }))
  })

  it('sees of each zone what zone-reach says: all of it, a part, or nothing', () => {
    fc.assert(fc.property(axis, (content) => {
      const { softLimitMin = 0, softLimitMax = 0 } = content.setup
      const told = new Map(zoneReach.judge(judgeInput(content)).filter(({ values }) => values.zones === undefined).map(({ values, level }) => [values.zone, level]))
      for (const { zone: number, from, to } of content.zones) {
        const places = Array.from({ length: to - from + 1 }, (_, step) => from + step)
        const reached = places.filter(place => place >= softLimitMin && place <= softLimitMax).length
        expect(told.get(number)).toBe(reached === places.length ? undefined : reached === 0 ? 'warn' : 'note')
      }
    }))
  })

  it('sees the same on an axis that wraps, whole turns aside', () => {
    fc.assert(fc.property(whole(0, 35), whole(1, 30), whole(-20, 20), whole(1, 35), (from, length, min, span) => {
      const setup: Setup = { modulo: 360, softLimitMin: min * 10, softLimitMax: (min + span) * 10 }
      const to = (from + length) % 36
      fc.pre(to !== from)
      const [result] = zoneReach.judge(judgeInput(rotary(setup, [], { zones: [{ zone: 1, from: from * 10, to: to * 10 }] })))
      // Places between the limits, as what they read within one turn; ends and middles of all steps of 5 degrees.
      const reachable = new Set(Array.from({ length: span * 2 + 1 }, (_, step) => (((min * 2 + step) % 72) + 72) % 72))
      const places = Array.from({ length: length * 2 + 1 }, (_, step) => (from * 2 + step) % 72)
      const reached = places.filter(place => reachable.has(place)).length
      const expected = reached === places.length ? undefined : reached === 0 ? 'warn' : 'note'
      expect(result?.level).toBe(expected)
    }))
  })
})

describe('turning the direction round', () => {
  const row = (move: number): fc.Arbitrary<Move> => fc.record({ kind: fc.constantFrom('absolute', 'relative', 'press'), place: whole(-90, 90), further: whole(1, 30) })
    .map(({ kind, place, further }) => kind === 'press' ? press(move, place, place + further) : kind === 'relative' ? relative(move, place) : absolute(move, place))
  const table = fc.tuple(row(0), row(1), row(2), row(3), row(4)).map(rows => [...rows])
  const image = (move: Move, centre: number): Move => ({
    ...move, target: move.kind === 'relative' ? 0 - move.target : centre - move.target, ...move.approach === undefined ? {} : { approach: centre - move.approach },
  })

  it('passes every table mirrored about the middle of its limits, wherever those lie', () => {
    fc.assert(fc.property(table, whole(-50, 50), whole(1, 200), (moves, min, span) => {
      const limits: Setup = { softLimitMin: min, softLimitMax: min + span }
      const before = linear({ ...limits, positiveDirection: 'extend' }, moves)
      const after = linear({ ...limits, positiveDirection: 'retract' }, moves.map(move => image(move, min + min + span)))
      expect(polarityFlip.judge(judgeInput(after, { before: { content: before } }))).toEqual([])
    }))
  })

  it('names just the rows whose image is another row', () => {
    fc.assert(fc.property(table, (moves) => {
      const before = linear({ positiveDirection: 'extend' }, moves)
      const after = linear({ positiveDirection: 'retract' }, moves)
      const own = moves.filter(move => JSON.stringify(image(move, 0)) !== JSON.stringify(move)).map(({ move }) => move)
      expect(polarityFlip.judge(judgeInput(after, { before: { content: before } })).flatMap(({ values }) => values.moves)).toEqual(own)
    }))
  })

  it('says the same forwards and backwards in time', () => {
    fc.assert(fc.property(table, table, (one, other) => {
      const told = (then: readonly Move[], now: readonly Move[]) => polarityFlip.judge(judgeInput(linear({ positiveDirection: 'retract' }, now), { before: { content: linear({ positiveDirection: 'extend' }, then) } })).map(({ values }) => values.moves)
      expect(told(one, other)).toEqual(told(other, one))
    }))
  })
})
