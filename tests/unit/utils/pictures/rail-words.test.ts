import { describe, expect, it } from 'vitest'
import { railInputOf, railSideOf } from '../../../../shared/pictures/rail-input'
import type { Content, Move } from '../../../../shared/settings/types'
import { railSentence } from '../../../../utils/pictures/rail-words'

const absolute = (move: number, target: number, rest: Partial<Move> = {}): Move => ({ move, kind: 'absolute', target, speed: 200, acceleration: 2000, ...rest })
const press = (move: number, approach: number, target: number): Move => ({ move, kind: 'press', approach, target, speed: 100, acceleration: 1000, forceLimit: 30 })

const lid = (moves: readonly Move[], setup: Content['setup'] = {}): Content => ({
  axisKind: 'linear', extra: {}, zones: [{ zone: 0, from: 0, to: 12 }], moves,
  setup: { softLimitMin: 2, softLimitMax: 185, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 0, ...setup },
})
const plate = { model: 'HL40-200V', axisKind: 'linear' as const, stroke: 200 }
const usual = [absolute(0, 5), absolute(1, 70), press(2, 88, 104), press(3, 98, 104), absolute(4, 96.5, { next: 5, dwell: 120 }), absolute(5, 62), { ...absolute(8, -2), kind: 'relative' as const }]

const inputOf = (content: Content, nameplate?: typeof plate) => railInputOf({ upper: content }, { upper: railSideOf(content, 'today, v15') }, nameplate)

describe('railSentence', () => {
  it('says with numbers what the picture shows', () => {
    expect(railSentence(inputOf(lid(usual), plate))).toBe(
      'Rail between hard stops at 0 and 200 mm, soft limits 2 and 185. Moves: 0 at 5, 5 at 62, 1 at 70, 4 at 96.5, press 2 from 88 to 104, press 3 from 98 to 104. Move 8 steps by −2 mm. Zones 0 from 0 to 12.',
    )
  })
})
