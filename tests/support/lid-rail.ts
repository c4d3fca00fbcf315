import { railInputOf, railSideOf } from '../../shared/pictures/rail-input'
import type { Content, Move } from '../../shared/settings/types'

/* A lid press with its moves, as its rail is drawn. */

export const absolute = (move: number, target: number, rest: Partial<Move> = {}): Move => ({ move, kind: 'absolute', target, speed: 200, acceleration: 2000, ...rest })
export const press = (move: number, approach: number, target: number): Move => ({ move, kind: 'press', approach, target, speed: 100, acceleration: 1000, forceLimit: 30 })

export const lid = (moves: readonly Move[], setup: Content['setup'] = {}): Content => ({
  axisKind: 'linear', extra: {}, zones: [{ zone: 0, from: 0, to: 12 }], moves,
  setup: { softLimitMin: 2, softLimitMax: 185, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 0, ...setup },
})
export const plate = { model: 'HL40-200V', axisKind: 'linear' as const, stroke: 200 }
export const usual = [absolute(0, 5), absolute(1, 70), press(2, 88, 104), press(3, 98, 104), absolute(4, 96.5, { next: 5, dwell: 120 }), absolute(5, 62), { ...absolute(8, -2), kind: 'relative' as const }]

export const inputOf = (content: Content, nameplate?: typeof plate) => railInputOf({ upper: content }, { upper: railSideOf(content, 'today, v15') }, nameplate)
