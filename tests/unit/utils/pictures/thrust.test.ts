import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { layoutThrust, thrustSentence, type ThrustPiece } from '../../../../utils/pictures/thrust'

const piece = (t0: number, t1: number, thrust: number, rest: Partial<ThrustPiece> = {}): ThrustPiece => ({ t0, t1, least: thrust, most: thrust, plus: 250, minus: 250, ...rest })
const numbersOf = (path: string) => (path.match(/-?\d+(\.\d+)?/g) ?? []).map(Number)

describe('layoutThrust', () => {
  it('draws thrust as level pieces, more towards plus higher up', () => {
    const { curves, zero } = layoutThrust([piece(0, 0.1, 200), piece(0.1, 0.5, 60), piece(0.5, 0.6, -80)], 480, 1)
    expect(curves).toHaveLength(1)
    expect(curves[0]).toMatch(/^M[\d. ]+H[\d.]+L[\d. ]+H[\d.]+L[\d. ]+H[\d.]+$/)
    const [, high = 0, , , middle = 0, , , low = 0] = numbersOf(curves[0] ?? '')
    const nought = numbersOf(zero)[1] ?? 0
    expect(high).toBeLessThan(middle)
    expect(middle).toBeLessThan(nought)
    expect(nought).toBeLessThan(low)
  })

  it('draws the limit of each sign that is asked for, and names it', () => {
    const up = layoutThrust([piece(0, 1, 200)], 480, 1)
    expect(up.limits).toHaveLength(1)
    expect(up.texts.map(text => text.text)).toContain('limit 250')
    const both = layoutThrust([piece(0, 1, 200), piece(1, 2, -100, { minus: 180 })], 480, 1)
    expect(both.limits).toHaveLength(2)
    expect(both.texts.map(text => text.text)).toContain('limit −250')
  })

  it('leaves out a limit that is not there, or so far off that the curve would be flat', () => {
    expect(layoutThrust([piece(0, 1, 200, { plus: Infinity })], 480, 1).limits).toEqual([])
    expect(layoutThrust([piece(0, 1, 20, { plus: 101 })], 480, 1).limits).toEqual([])
    expect(layoutThrust([piece(0, 1, 20, { plus: 100 })], 480, 1).limits).toHaveLength(1)
  })

  it('draws a band where the thrust is not one number', () => {
    expect(layoutThrust([{ t0: 0, t1: 1, least: -3, most: 5, plus: 9, minus: 9 }], 480, 1).curves).toHaveLength(2)
  })

  it('keeps inside its frame, whatever the thrust', () => {
    const thrusts = fc.double({ min: -5000, max: 5000, noNaN: true })
    fc.assert(fc.property(fc.array(thrusts, { minLength: 1, maxLength: 20 }), fc.double({ min: 0.1, max: 6000, noNaN: true }), fc.integer({ min: 260, max: 900 }), (list, limit, width) => {
      const layout = layoutThrust(list.map((thrust, index) => piece(index, index + 1, thrust, { plus: limit, minus: limit })), width, 1)
      for (const path of [...layout.curves, ...layout.limits, layout.zero]) {
        for (const number of numbersOf(path)) expect(number >= 0 && number <= Math.max(width, layout.height)).toBe(true)
      }
    }), { numRuns: 80 })
  })
})

describe('thrustSentence', () => {
  it('says from where to where, and the lowest limits', () => {
    expect(thrustSentence([piece(0, 1, 200.04), piece(1, 2, -80, { plus: 204.8, minus: Infinity })], 'Thrust', 'N', 1)).toBe('Thrust over time: from −80 to 200 N. Lowest limit towards plus 204.8 N, towards minus 250 N.')
    expect(thrustSentence([piece(0, 1, 2.1251, { plus: Infinity })], 'Torque', 'N·m', 3)).toBe('Torque over time: from 2.125 to 2.125 N·m. Lowest limit towards plus none, towards minus 250 N·m.')
  })
})
