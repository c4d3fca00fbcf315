import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fitsTonight, rankSpares, type RankedSpare } from '../../../../shared/swap/spares'

const spare = (serial: string, more: Partial<RankedSpare> = {}): RankedSpare => ({ serial, fit: 'same', reasons: [], adjusted: 0, sameModel: true, sameFirmware: true, near: true, ...more })
const hard = { code: 'stroke-short', hard: true, message: 'm', at: [] } as const
const soft = { code: 'stop-check', hard: false, message: 'm', at: [] } as const

describe('spares', () => {
  const ranked = [
    spare('A'), spare('B'), spare('C', { near: false }), spare('D', { sameFirmware: false }), spare('E', { sameModel: false }),
    spare('F', { fit: 'adjust', adjusted: 2, sameModel: false }), spare('G', { fit: 'adjust', adjusted: 5, sameModel: false }),
    spare('H', { fit: 'unfit', reasons: [soft] }), spare('I', { fit: 'unfit', reasons: [soft, hard] }),
  ]

  it('stand best first, whatever order they came in', () => fc.assert(fc.property(fc.shuffledSubarray(ranked, { minLength: ranked.length }), (mixed) => {
    expect(rankSpares(mixed).map(({ serial }) => serial)).toEqual(ranked.map(({ serial }) => serial))
  })))

  it('go in tonight where nobody has to allow it', () => {
    expect([spare('A'), spare('B', { fit: 'adjust' }), spare('C', { fit: 'unfit' })].map(fitsTonight)).toEqual([true, true, false])
  })
})
