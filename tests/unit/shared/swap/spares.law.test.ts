import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fitsTonight, rankSpares, type RankedSpare } from '../../../../shared/swap/spares'
import { fits } from '../../../../shared/swap/types'

const reason = (hard: boolean) => ({ code: 'stop-check', hard, message: 'm', at: [] } as const)
const spare: fc.Arbitrary<RankedSpare> = fc.record({
  fit: fc.constantFrom(...fits), reasons: fc.array(fc.boolean().map(reason), { maxLength: 2 }), adjusted: fc.nat(3),
  sameModel: fc.boolean(), sameFirmware: fc.boolean(), near: fc.boolean(), serial: fc.constantFrom('HL-1', 'HL-10', 'HL-2', 'hl-2'),
})
const stock = fc.array(spare, { maxLength: 12 })

/** The rank in one number, digit by digit as the finder promises it. */
const rank = ({ fit, reasons, sameModel, sameFirmware, adjusted, near }: RankedSpare) =>
  [fits.indexOf(fit), reasons.some(({ hard }) => hard) ? 1 : 0, sameModel ? 0 : 1, sameFirmware ? 0 : 1, adjusted, near ? 0 : 1].reduce((sum, digit) => sum * 10 + digit, 0)

describe('spares in their order', () => {
  it('none is lost and none is added', () => fc.assert(fc.property(stock, (spares) => {
    const ranked = rankSpares(spares)
    expect(ranked).toHaveLength(spares.length)
    expect(new Set(ranked)).toEqual(new Set(spares))
  })))

  it('rise by fit, leave, model, firmware, values that change, place, serial', () => fc.assert(fc.property(stock, (spares) => {
    const ranked = rankSpares(spares)
    for (const [index, next] of ranked.slice(1).entries()) {
      const before = ranked[index] ?? next
      expect(rank(before)).toBeLessThanOrEqual(rank(next))
      if (rank(before) === rank(next)) expect(before.serial <= next.serial).toBe(true)
    }
  })))

  it('do not touch the list that came in', () => fc.assert(fc.property(stock, (spares) => {
    const before = [...spares]
    rankSpares(spares)
    expect(spares).toEqual(before)
  })))

  it('those that go in tonight stand before all others', () => fc.assert(fc.property(stock, (spares) => {
    const tonight = rankSpares(spares).map(fitsTonight)
    expect(tonight.lastIndexOf(true)).toBeLessThan(tonight.includes(false) ? tonight.indexOf(false) : Infinity)
  })))

  it('unfit ones that a planner may allow before those that nobody may', () => {
    const unfit = (serial: string, ...reasons: ReturnType<typeof reason>[]): RankedSpare => ({ serial, fit: 'unfit', reasons, adjusted: 0, sameModel: false, sameFirmware: false, near: false })
    const near = { ...unfit('A', reason(false), reason(true)), near: true, sameModel: true }
    expect(rankSpares([near, unfit('C', reason(false)), unfit('B', reason(false), reason(false))]).map(({ serial }) => serial)).toEqual(['B', 'C', 'A'])
  })
})
