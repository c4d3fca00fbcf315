import { describe, expect, it } from 'vitest'
import { pressSpeed } from '../../../../shared/checks/press-speed'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import { absolute, judgeInput, linear, plate, press, rotary, told } from '../../../support/check-input'

const presses = (speed: number | undefined, setup = {}, more: Partial<Nameplate> = {}) => judgeInput(
  linear(setup, [press(6, 100, 150, { pressSpeed: speed })]), { nameplate: plate({ maxPressSpeed: 20, ...more }) })

describe('press-speed', () => {
  it('is silent up to the speed that the unit may press with', () => {
    expect(told(pressSpeed, presses(10))).toEqual([])
    expect(told(pressSpeed, presses(20))).toEqual([])
  })

  it('stops above it: 25 − 20 = 5 mm/s', () => {
    const input = presses(25)
    expect(told(pressSpeed, input)).toEqual(['stop: Press 6 presses at 25 mm/s, 5 mm/s above the 20 mm/s that the unit may press with.'])
    expect(pressSpeed.judge(input)).toMatchObject([{ at: ['/moves/0/pressSpeed'], values: { move: 6, speed: 25, limit: 20 } }])
  })

  it('takes the press speed of the setup where the row has none, and stops where that is missing too', () => {
    expect(told(pressSpeed, presses(undefined, { pressSpeed: 15 }))).toEqual([])
    expect(pressSpeed.judge(presses(undefined, { pressSpeed: 30 }))[0]!.at).toEqual(['/setup/pressSpeed'])
    expect(told(pressSpeed, presses(undefined))).toEqual(['stop: Press 6 has no press speed: it cannot go on from its approach.'])
    expect(told(pressSpeed, presses(undefined, { pressSpeed: 0 }))).toEqual(['stop: Press 6 has a press speed of 0 mm/s: it cannot go on from its approach.'])
  })

  it('names the speed that the nameplate lacks', () => {
    expect(told(pressSpeed, judgeInput(linear({}, [press(6, 100, 150)])))).toEqual(['unknown: Press speed cannot be judged without nameplate.maxPressSpeed.'])
  })

  describe('the blow on the part', () => {
    // mR = 0.5 kg·cm² = 5e-5 kg·m², lead 10 mm: 5e-5·(2π/0.01)² = 5e-5·394784.176 = 19.7392088 kg.
    // With 4 kg and 1 kg: 24.7392088 kg. At 20 mm/s: ½·24.7392088·0.02² = 0.00494784 J; at 10 mm/s a quarter, 0.00123696 J.
    const screw = { movingMass: 1, rotorInertia: 0.5, lead: 10 }

    it('warns with the mass that the turning parts are worth', () => {
      const input = presses(20, { payloadMass: 4 }, { ...screw, maxImpactEnergy: 0.004 })
      expect(told(pressSpeed, input)).toEqual(['warn: Press 6 meets the part with 0.004948 J at 20 mm/s: more than the 0.004 J that the unit stands.'])
      expect(pressSpeed.judge(input)[0]!.values.energy).toBeCloseTo(0.00494784, 8)
      expect(told(pressSpeed, presses(10, { payloadMass: 4 }, { ...screw, maxImpactEnergy: 0.004 }))).toEqual([])
    })

    it('lets exactly the permitted energy pass: 8 kg at 500 mm/s are ½·8·0.25 = 1 J', () => {
      const blow = (maxImpactEnergy: number) => told(pressSpeed, presses(500, { payloadMass: 8 },
        { maxPressSpeed: 500, movingMass: 0, rotorInertia: 0, lead: 10, maxImpactEnergy }))
      expect(blow(1)).toEqual([])
      expect(blow(0.999999)).toHaveLength(1)
    })

    it('says what it counted as nothing', () => {
      expect(told(pressSpeed, presses(20, { payloadMass: 50 }, { maxImpactEnergy: 0.004 }))[0])
        .toBe('warn: Press 6 meets the part with 0.01 J at 20 mm/s, without the moving mass of the unit and the rotor: more than the 0.004 J that the unit stands.')
    })

    it('waits for the payload', () => {
      expect(told(pressSpeed, presses(20, {}, { ...screw, maxImpactEnergy: 0.004 }))).toEqual(['unknown: Press speed cannot be judged without payloadMass.'])
    })

    it('turns with inertia and gear on a rotary axis', () => {
      // J = 100 + 1·10² = 200 kg·cm² = 0.02 kg·m²; 90 deg/s = π/2 rad/s; ½·0.02·(π/2)² = 0.0246740 J.
      const turning = (payloadInertia: number | undefined) => judgeInput(rotary({ payloadInertia }, [press(6, 100, 150, { pressSpeed: 90 })]),
        { nameplate: plate({ axisKind: 'rotary', maxPressSpeed: 90, rotorInertia: 1, gearRatio: 10, maxImpactEnergy: 0.02 }) })
      expect(pressSpeed.judge(turning(100))[0]!.values.energy).toBeCloseTo(0.024674, 6)
      expect(told(pressSpeed, turning(undefined))).toEqual(['unknown: Press speed cannot be judged without payloadInertia.'])
    })
  })

  it('does not apply without a press', () => {
    expect(told(pressSpeed, judgeInput(linear({ pressSpeed: 500 }, [absolute(1, 5)])))).toEqual(['not applicable'])
  })
})
