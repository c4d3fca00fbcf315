import { describe, expect, it } from 'vitest'
import { homingPlausible } from '../../../../shared/checks/homing-plausible'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Setup } from '../../../../shared/settings/types'
import { judgeInput, linear, plate, rotary, told } from '../../../support/check-input'

// 9 kg and 1 kg of the unit upright: 98.0665 N, with 7 N of friction 105.0665 N; 100 % are 300 N.
const homes = (setup: Setup, more: Partial<Nameplate> = {}) => judgeInput(
  linear({ homingMethod: 'hard-stop', homingDirection: 'negative', homingForceLimit: 40, homingSpeed: 40, payloadMass: 9, mountingAngle: 90, frictionForce: 7, ...setup }),
  { nameplate: plate({ ratedThrust: 300, movingMass: 1, rotorInertia: 0, lead: 10, ...more }) })

describe('homing-plausible', () => {
  it('is silent for a homing that lifts its load: 40 % = 120 N', () => {
    expect(told(homingPlausible, homes({ homingCreepSpeed: 5 }))).toEqual([])
    expect(told(homingPlausible, homes({ homingCreepSpeed: 40 }))).toEqual([])
  })

  it('stops one that is weaker than weight and friction, either way it goes: 30 % = 90 N of 105.0665 N', () => {
    const input = homes({ homingForceLimit: 30 })
    expect(told(homingPlausible, input)).toEqual(['stop: Homing pushes with 30 %, 90 N, and weight and friction take 105.1 N.'])
    const [found] = homingPlausible.judge(input)
    expect(found).toMatchObject({ at: ['/setup/homingForceLimit'], values: { thrust: 90, forceLimit: 30 } })
    expect(found!.values.need).toBeCloseTo(105.0665, 9)
    expect(told(homingPlausible, homes({ homingForceLimit: 30, homingDirection: 'positive' }))).toHaveLength(1)
    expect(told(homingPlausible, homes({ homingForceLimit: 30, mountingAngle: -90 }))).toHaveLength(1)
  })

  it('lets just as much pass: friction of 21.9335 N make it 120 N', () => {
    expect(told(homingPlausible, homes({ frictionForce: 21.9335 }))).toEqual([])
    expect(told(homingPlausible, homes({ frictionForce: 21.94 }))).toHaveLength(1)
  })

  it('stops hard-stop homing without a force limit, and only that', () => {
    expect(told(homingPlausible, homes({ homingForceLimit: undefined }))).toEqual(['stop: Homing runs into the hard stop without a force limit: it pushes with all that the unit has.'])
    expect(told(homingPlausible, homes({ homingForceLimit: undefined, homingMethod: 'limit-switch' }))).toEqual([])
  })

  it('holds the force of a search for a switch against the load too, and asks none of a homing that stands still', () => {
    expect(told(homingPlausible, homes({ homingForceLimit: 30, homingMethod: 'home-switch' }))).toHaveLength(1)
    expect(told(homingPlausible, homes({ homingForceLimit: 1, homingMethod: 'absolute-encoder' }))).toEqual([])
  })

  it('warns of a creep faster than the search: 50 − 40 = 10 mm/s', () => {
    expect(told(homingPlausible, homes({ homingCreepSpeed: 50 }))).toEqual(['warn: Homing creeps with 50 mm/s, 10 mm/s faster than it looks for home with 40 mm/s.'])
  })

  it('warns of the current position', () => {
    expect(told(homingPlausible, homes({ homingMethod: 'current-position' })))
      .toEqual(['warn: Homing takes the place where the axis stands for its zero: after every loss of power all places lie elsewhere.'])
  })

  describe('the blow at the hard stop', () => {
    // 10 kg and mR = 19.7392088 kg at 40 mm/s: ½·29.7392088·0.04² = 0.02379137 J.
    it('warns above what the unit stands', () => {
      const input = homes({}, { rotorInertia: 0.5, maxImpactEnergy: 0.02 })
      expect(told(homingPlausible, input)).toEqual(['warn: Homing meets the hard stop with 0.02379 J at 40 mm/s: more than the 0.02 J that the unit stands.'])
      expect(homingPlausible.judge(input)[0]!.values.energy).toBeCloseTo(0.02379137, 8)
    })

    it('lets just as much pass: ½·10·0.04² = 0.008 J', () => {
      expect(told(homingPlausible, homes({}, { maxImpactEnergy: 0.008 }))).toEqual([])
      expect(told(homingPlausible, homes({}, { maxImpactEnergy: 0.0079 }))).toHaveLength(1)
    })

    it('is none where home is no hard stop, or the unit tells no limit', () => {
      expect(told(homingPlausible, homes({ homingMethod: 'limit-switch' }, { maxImpactEnergy: 0.001 }))).toEqual([])
      expect(told(homingPlausible, homes({ homingSpeed: undefined }))).toEqual([])
    })

    it('waits for speed and payload', () => {
      expect(told(homingPlausible, homes({ homingSpeed: undefined }, { maxImpactEnergy: 1 }))).toEqual(['unknown: The blow of homing cannot be judged without homingSpeed.'])
      expect(told(homingPlausible, homes({ payloadMass: undefined }, { maxImpactEnergy: 1 }))).toEqual([
        'unknown: The force of homing cannot be judged without payloadMass.', 'unknown: The blow of homing cannot be judged without payloadMass.',
      ])
    })
  })

  it('turns: 0.2 N·m of friction and 0.3 N·m of unbalance of 40 % of 1 N·m, and hits with ½·J·ω²', () => {
    const setup = { homingMethod: 'hard-stop', homingForceLimit: 40, homingSpeed: 90, payloadInertia: 100, mountingAngle: 90, unbalanceTorque: 0.3, frictionTorque: 0.2 } as const
    // ½·0.01·(π/2)² = 0.012337 J.
    const input = judgeInput(rotary(setup), { nameplate: plate({ axisKind: 'rotary', ratedThrust: 1, rotorInertia: 0, maxImpactEnergy: 0.01 }) })
    expect(told(homingPlausible, input)).toEqual([
      'stop: Homing pushes with 40 %, 0.4 N·m, and weight and friction take 0.5 N·m.',
      'warn: Homing meets the hard stop with 0.01234 J at 90 deg/s: more than the 0.01 J that the unit stands.',
    ])
  })

  it('names the method and the load where they are not given', () => {
    expect(told(homingPlausible, judgeInput(linear({ homingForceLimit: 20 })))).toEqual([
      'unknown: The force of homing cannot be judged without payloadMass, mountingAngle and nameplate.ratedThrust.',
      'unknown: Homing cannot be judged without homingMethod.',
    ])
  })

  it('does not apply where nothing of homing is set', () => {
    expect(told(homingPlausible, judgeInput(linear({ softLimitMin: 0 })))).toEqual(['not applicable'])
  })
})
