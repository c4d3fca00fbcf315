import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { layoutThrust, thrustSentence, type ThrustPiece } from '../../../../utils/pictures/thrust'

const piece = (t0: number, t1: number, thrust: number, rest: Partial<ThrustPiece> = {}): ThrustPiece => ({ t0, t1, least: thrust, most: thrust, plus: 250, minus: 250, ...rest })
const draw = (after: readonly ThrustPiece[], before?: readonly ThrustPiece[]) => layoutThrust({ after, digits: 1, ...(before && { before }) }, 480)
const numbersOf = (path: string) => (path.match(/-?\d+(\.\d+)?/g) ?? []).map(Number)

describe('layoutThrust', () => {
  it('draws thrust as level pieces, more towards plus higher up', () => {
    const { curves, zero } = draw([piece(0, 0.1, 200), piece(0.1, 0.5, 60), piece(0.5, 0.6, -80)])
    expect(curves).toHaveLength(1)
    expect(curves[0]?.d).toMatch(/^M[\d. ]+H[\d.]+L[\d. ]+H[\d.]+L[\d. ]+H[\d.]+$/)
    const [, high = 0, , , middle = 0, , , low = 0] = numbersOf(curves[0]?.d ?? '')
    const nought = numbersOf(zero)[1] ?? 0
    expect(high).toBeLessThan(middle)
    expect(middle).toBeLessThan(nought)
    expect(nought).toBeLessThan(low)
  })

  it('draws the limit of each sign that is asked for, and names it', () => {
    const up = draw([piece(0, 1, 200)])
    expect(up.lines).toHaveLength(1)
    expect(up.texts.map(text => text.text)).toContain('limit 250')
    const both = draw([piece(0, 1, 200), piece(1, 2, -100, { minus: 180 })])
    expect(both.lines).toHaveLength(2)
    expect(both.texts.map(text => text.text)).toContain('limit −250')
  })

  it('leaves out a limit that is not there, or so far off that the curve would be flat', () => {
    expect(draw([piece(0, 1, 200, { plus: Infinity })]).lines).toEqual([])
    expect(draw([piece(0, 1, 20, { plus: 101 })]).lines).toEqual([])
    expect(draw([piece(0, 1, 20, { plus: 100 })]).lines).toHaveLength(1)
  })

  it('draws a band where the thrust is not one number', () => {
    expect(draw([{ t0: 0, t1: 1, least: -3, most: 5, plus: 9, minus: 9 }]).curves).toHaveLength(2)
  })

  it('draws old under new on one time base, each with its end, and the old limit only where it is another one', () => {
    const layout = draw([piece(0, 0.4, 200)], [piece(0, 0.5, 150)])
    expect(layout.curves.map(({ tone }) => tone)).toEqual(['before', 'after'])
    expect(numbersOf(layout.curves[1]?.d ?? '').at(-1)).toBeLessThan(numbersOf(layout.curves[0]?.d ?? '').at(-1) ?? 0)
    expect(layout.lines.map(({ tone }) => tone)).toEqual(['line'])
    expect(layout.texts.filter(text => text.tone !== 'line').map(text => text.text).sort()).toEqual(['0.4', '0.5'])
    const lower = draw([piece(0, 0.4, 200)], [piece(0, 0.5, 150, { plus: 180 })])
    expect(lower.lines.map(({ tone }) => tone)).toEqual(['before', 'line'])
    expect(lower.texts.map(text => text.text)).toEqual(expect.arrayContaining(['limit before 180', 'limit 250']))
  })

  it('keeps inside its frame, whatever the thrust', () => {
    const thrusts = fc.double({ min: -5000, max: 5000, noNaN: true })
    fc.assert(fc.property(fc.array(thrusts, { minLength: 1, maxLength: 20 }), fc.double({ min: 0.1, max: 6000, noNaN: true }), fc.integer({ min: 260, max: 900 }), (list, limit, width) => {
      const layout = layoutThrust({ after: list.map((thrust, index) => piece(index, index + 1, thrust, { plus: limit, minus: limit })), digits: 1 }, width)
      for (const path of [...layout.curves.map(one => one.d), ...layout.lines.map(one => one.d), layout.zero]) {
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
