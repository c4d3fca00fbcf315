import { describe, expect, it } from 'vitest'
import { rules } from '../../../../shared/checks/table'
import type { JudgeInput } from '../../../../shared/checks/types'
import type { Move } from '../../../../shared/settings/types'
import { absolute, press, relative, unused } from '../../../support/check-input'
import { holdsCases, reachesItsLevels, type Case, type Change } from '../../../support/rule-cases'

/*
 * Each rule by the numbers: a case that passes, one that fails, the last that passes and the first that does not, and what
 * it does without a value that it needs. Numbers are worked by hand beside the case. All start from one sound axis: level,
 * 4 kg on 1 kg, 300 N rated and 600 N peak, soft limits 0 to 198 mm, hard stops at −1 and 201 mm.
 */

/** Without a rotor, so that masses are those of payload and moving part: 5 kg. */
const bare = { rotorInertia: undefined, lead: undefined }
const gravity = { axis: { axisKind: 'linear', flags: ['gravity'] } } as const satisfies Partial<JudgeInput>
const hanging = { mountingAngle: 90, frictionForce: 0 }
const later = (moves: readonly Move[]): Change => ({ moves: [absolute(0, 0, { next: 1 }), ...moves] })

const cases: Readonly<Record<string, readonly Case[]>> = {
  'travel-span': [
    ['0 to 198 mm of 200 mm', {}, []],
    ['just the stroke, 200 mm', { setup: { softLimitMax: 200 } }, []],
    ['a millionth more', { setup: { softLimitMax: 200.000001 } }, ['stop']],
    ['no span at all', { setup: { softLimitMin: 198 } }, ['stop']],
    ['without an upper limit', { setup: { softLimitMax: undefined } }, ['unknown']],
    ['without a nameplate', { plate: null }, ['unknown']],
  ],
  'travel-placed': [
    // h = −1: the stroke runs from h + 1 = 0 to h + 1 + 200 = 200 mm.
    ['within the stroke', {}, []],
    ['to its upper end', { setup: { softLimitMax: 200 } }, []],
    ['a millionth beyond it', { setup: { softLimitMax: 200.000001 } }, ['stop']],
    ['a millionth below its lower end', { setup: { softLimitMin: -0.000001 } }, ['stop']],
    ['a unit whose home reads +1: the stroke runs from 2 to 202 mm', { plate: { homeOffsetSense: 'home-reads-offset' } }, ['stop']],
    ['without a home offset', { setup: { homeOffset: undefined } }, ['unknown']],
    ['found by a switch, which tells no hard stop', { setup: { homingMethod: 'home-switch' } }, ['unknown']],
  ],
  'soft-limits-off': [
    ['on', { setup: { softLimitsActive: true } }, []],
    ['off', { setup: { softLimitsActive: false } }, ['warn']],
    ['off where a load can fall', { setup: { softLimitsActive: false }, input: gravity }, ['stop']],
    ['off where it presses', { setup: { softLimitsActive: false }, input: { axis: { axisKind: 'linear', flags: ['press'] } } }, ['stop']],
    ['off where it can only collide', { setup: { softLimitsActive: false }, input: { axis: { axisKind: 'linear', flags: ['collision'] } } }, ['warn']],
    ['not written', {}, 'not applicable'],
  ],
  'target-inside': [
    ['to either limit', { moves: [absolute(1, 0), absolute(2, 198)] }, []],
    ['a millionth beyond each', { moves: [absolute(1, -0.000001), absolute(2, 198.000001)] }, ['stop', 'stop']],
    ['a relative move from a known start: 150 + 48', { moves: [absolute(1, 150, { next: 2 }), relative(2, 48)] }, []],
    ['and 150 + 48.1', { moves: [absolute(1, 150, { next: 2 }), relative(2, 48.1)] }, ['stop']],
    ['without an upper limit', { setup: { softLimitMax: undefined }, moves: [absolute(1, 50)] }, ['unknown']],
  ],
  'relative-step': [
    // floor(198/d): 99 fits twice, 99.1 once, 198.1 not at all; 0 goes nowhere.
    ['99 mm', { moves: [relative(1, 99)] }, ['note']],
    ['99.1 mm', { moves: [relative(1, -99.1)] }, ['warn']],
    ['198 mm', { moves: [relative(1, 198)] }, ['warn']],
    ['198.1 mm', { moves: [relative(1, 198.1)] }, ['stop']],
    ['without limits', { setup: { softLimitMin: undefined, softLimitMax: undefined }, moves: [relative(1, 10)] }, ['unknown']],
    ['a table without relative moves', {}, 'not applicable'],
  ],
  'press-path': [
    ['150 to 198 mm, from 0 mm', later([press(1, 150, 198)]), []],
    ['to 198.1 mm', later([press(1, 150, 198.1)]), ['stop']],
    ['its target at its approach', later([press(1, 150, 150)]), ['stop']],
    ['from just its approach', { moves: [absolute(0, 150, { next: 1 }), press(1, 150, 170)] }, []],
    ['from beyond its approach', { moves: [absolute(0, 151, { next: 1 }), press(1, 150, 170)] }, ['stop']],
    ['called from nobody knows where, while a move ends at 160 mm', { moves: [absolute(0, 160), press(1, 150, 170)] }, ['unknown']],
  ],
  'press-force': [
    ['20 and 70 %, the ends of the unit’s range', { moves: [press(1, 50, 60, { forceLimit: 20 }), press(2, 50, 60, { forceLimit: 70 })] }, []],
    ['19.9 and 70.1 %', { moves: [press(1, 50, 60, { forceLimit: 19.9 }), press(2, 50, 60, { forceLimit: 70.1 })] }, ['stop', 'stop']],
    ['above the thrust limit of its sign', { setup: { thrustLimitPositive: 29 }, moves: [press(1, 50, 60)] }, ['stop']],
    ['just at it', { setup: { thrustLimitPositive: 30 }, moves: [press(1, 50, 60)] }, []],
    ['that of the other sign does not count', { setup: { thrustLimitNegative: 29 }, moves: [press(1, 50, 60)] }, []],
    ['without a range on the nameplate', { plate: { pressForceMin: undefined, pressForceMax: undefined }, moves: [press(1, 50, 60)] }, ['unknown']],
  ],
  'press-arrives': [
    // 6 N of friction are 2 % of 300 N: just as much never gets there.
    ['2.000001 %', { setup: { frictionForce: 6 }, moves: [press(1, 50, 60, { forceLimit: 2.000001 })] }, []],
    ['2 %', { setup: { frictionForce: 6 }, moves: [press(1, 50, 60, { forceLimit: 2 })] }, ['stop']],
    // Downwards 5 kg pull with 49.03 N less 5 N of friction; 14.67 % of 300 N are 44.01 N, less, and 14.68 % 44.04 N.
    ['lets the load run', { setup: { mountingAngle: -90 }, plate: { forceLimitActsBothWays: true }, moves: [press(1, 50, 60, { forceLimit: 14.67 })] }, ['stop']],
    ['holds it', { setup: { mountingAngle: -90 }, plate: { forceLimitActsBothWays: true }, moves: [press(1, 50, 60, { forceLimit: 14.68 })] }, []],
    // 20 mm/s need 20²/(2·2000) = 0.1 mm to stop.
    ['0.1 mm to stop from 20 mm/s', { moves: [press(1, 50, 50.1, { pressSpeed: 20 })] }, []],
    ['0.099 mm', { moves: [press(1, 50, 50.099, { pressSpeed: 20 })] }, ['warn']],
    ['without a payload', { setup: { payloadMass: undefined }, moves: [press(1, 50, 60)] }, ['unknown']],
  ],
  'press-hold': [
    ['100 % without end', { moves: [press(1, 50, 60, { forceLimit: 100 })] }, []],
    ['100.1 % without end', { moves: [press(1, 50, 60, { forceLimit: 100.1 })] }, ['warn']],
    ['100.1 % while a move follows', { moves: [press(1, 50, 60, { forceLimit: 100.1, next: 2 }), absolute(2, 0)] }, []],
    ['below the overload level', { setup: { overloadLevel: 30.1, overloadTime: 500 }, moves: [press(1, 50, 60)] }, []],
    ['at it, without end', { setup: { overloadLevel: 30, overloadTime: 500 }, moves: [press(1, 50, 60)] }, ['stop']],
    ['at it, for as long as the overload lasts', { setup: { overloadLevel: 30, overloadTime: 500 }, moves: [press(1, 50, 60, { next: 2, dwell: 500 }), absolute(2, 0)] }, []],
    ['and a millisecond longer', { setup: { overloadLevel: 30, overloadTime: 500 }, moves: [press(1, 50, 60, { next: 2, dwell: 501 }), absolute(2, 0)] }, ['stop']],
    ['with a time and no level', { setup: { overloadTime: 500 }, moves: [press(1, 50, 60)] }, ['unknown']],
  ],
  'press-speed': [
    ['20 mm/s', { moves: [press(1, 50, 60, { pressSpeed: 20 })] }, []],
    ['20.1 mm/s', { moves: [press(1, 50, 60, { pressSpeed: 20.1 })] }, ['stop']],
    ['none', { moves: [{ ...press(1, 50, 60), pressSpeed: undefined } as unknown as Move] }, ['stop']],
    // ½ · 5 kg · (0.02 m/s)² = 0.001 J.
    ['a blow of 0.001 J', { plate: { ...bare, maxImpactEnergy: 0.001 }, moves: [press(1, 50, 60, { pressSpeed: 20 })] }, []],
    ['and less allowed', { plate: { ...bare, maxImpactEnergy: 0.000999 }, moves: [press(1, 50, 60, { pressSpeed: 20 })] }, ['warn']],
    ['without a limit on the nameplate', { plate: { maxPressSpeed: undefined }, moves: [press(1, 50, 60)] }, ['unknown']],
  ],
  'thrust-limit': [
    ['rated, 100 %', { setup: { thrustLimit: 100 } }, []],
    ['100.1 % and no overload', { setup: { thrustLimit: 100.1 } }, ['warn']],
    ['100.1 % and an overload', { setup: { thrustLimit: 100.1, overloadTime: 500 } }, ['note']],
    ['the peak, 600 N of 300 N', { setup: { thrustLimit: 200, overloadLevel: 120 } }, ['note']],
    ['200.1 %', { setup: { thrustLimit: 200.1, overloadLevel: 120 } }, ['stop']],
    ['a peak in newtons of no known base', { setup: { thrustLimit: 150 }, plate: { ratedThrust: undefined } }, ['warn', 'unknown']],
  ],
  'overload-plausible': [
    ['at the thrust limit of 80 %, for 1000 ms', { setup: { overloadLevel: 80, overloadTime: 1000 } }, []],
    ['above every limit', { setup: { overloadLevel: 80.1 } }, ['note']],
    ['longer than the unit stands', { setup: { overloadTime: 1000.1 } }, ['stop']],
    ['without a time on the nameplate', { setup: { overloadTime: 500 }, plate: { maxOverloadTime: undefined } }, ['unknown']],
    ['without either', {}, 'not applicable'],
  ],
  'speed-limit': [
    ['600 mm/s, the setup’s own limit; jog at 800 mm/s, the unit’s', { setup: { jogSpeed: 800 }, moves: [absolute(1, 50, { speed: 600 })] }, []],
    ['600.1 mm/s', { moves: [absolute(1, 50, { speed: 600.1 })] }, ['warn']],
    ['jog at 800.1 mm/s', { setup: { jogSpeed: 800.1 } }, ['stop']],
    ['a move above both', { moves: [absolute(1, 50, { speed: 801 })] }, ['stop', 'warn']],
    ['without a limit on the nameplate', { plate: { maxSpeed: undefined } }, ['unknown']],
  ],
  'acceleration-limit': [
    ['3000 mm/s² within both limits of the setup', { setup: { accelerationLimit: 3000, decelerationLimit: 3000 }, moves: [absolute(1, 50, { acceleration: 3000 })] }, []],
    ['braking by 3000.1 mm/s²', { setup: { accelerationLimit: 3000, decelerationLimit: 3000 }, moves: [absolute(1, 50, { acceleration: 3000, deceleration: 3000.1 })] }, ['warn']],
    ['5000 mm/s², the unit’s', { moves: [absolute(1, 50, { acceleration: 5000 })] }, []],
    ['5000.1 mm/s²', { moves: [absolute(1, 50, { acceleration: 5000.1 })] }, ['stop']],
    ['a quick stop is exempt', { setup: { quickStopDeceleration: 90_000, decelerationLimit: 3000 } }, []],
    ['without a limit on the nameplate', { plate: { maxAcceleration: undefined } }, ['unknown']],
  ],
  'quick-stop-soft': [
    ['as hard as the hardest move, 5000 mm/s²', { moves: [absolute(1, 50, { deceleration: 5000 }), absolute(2, 50)] }, []],
    ['softer', { moves: [absolute(1, 50, { deceleration: 5000.1 })] }, ['warn']],
    ['without a quick stop', { setup: { quickStopDeceleration: undefined } }, ['unknown']],
    ['a table of empty rows', { moves: [unused(1)] }, 'not applicable'],
  ],
  'speed-reached': [
    // √(31.25 · 2000) = 250 mm/s.
    ['250 mm/s after 31.25 mm', later([absolute(1, 31.25)]), []],
    ['31.24 mm are too short', later([absolute(1, 31.24)]), ['note']],
    ['from nobody knows where it is taken to be reached', { moves: [absolute(1, 31.24)] }, []],
  ],
  'thrust-needed': [
    // 5 kg · 2 m/s² + 5 N = 15 N: 5 % of 300 N; 80 % of 6.25 % (18.75 N) are 15 N.
    ['15 N of 18.75 N', { setup: { thrustLimit: 6.25 }, plate: bare }, []],
    ['15 N of 18.72 N', { setup: { thrustLimit: 6.24 }, plate: bare }, ['warn']],
    ['15 N of 15 N', { setup: { thrustLimit: 5 }, plate: bare }, ['warn']],
    ['15 N of 14.97 N', { setup: { thrustLimit: 4.99 }, plate: bare }, ['stop']],
    ['without a payload', { setup: { payloadMass: undefined } }, ['unknown']],
  ],
  'thrust-rms': [
    // Upright and at rest all the time: 5 · 9.80665 = 49.03325 N, 85 % of 57.686 N.
    ...([[57.69, []], [57.68, ['warn']], [49.04, ['warn']], [49.03, ['stop']]] as const).map(([ratedThrust, levels]): Case =>
      [`49.03 N held without end of ${ratedThrust} N`, { setup: hanging, plate: { ...bare, ratedThrust }, moves: [absolute(1, 50, { next: 1, dwell: 1000 })] }, levels]),
    ['without rated thrust', { plate: { ratedThrust: undefined }, moves: [absolute(1, 50, { next: 1, dwell: 1000 })] }, ['unknown']],
    ['no chain and no duty', {}, 'not applicable'],
  ],
  'payload': [
    ['30 kg, level', { setup: { payloadMass: 30 } }, []],
    ['30.1 kg', { setup: { payloadMass: 30.1 } }, ['stop']],
    ['12 kg upright', { setup: { payloadMass: 12, mountingAngle: -90 } }, []],
    ['12.1 kg upright', { setup: { payloadMass: 12.1, mountingAngle: 90 } }, ['stop']],
    // At 30°: 1/(0.5/30 + 0.5/12) = 17.142857 kg, not the 21 kg between both.
    ['17.1 kg at 30°', { setup: { payloadMass: 17.1, mountingAngle: 30 } }, []],
    ['17.2 kg at 30°', { setup: { payloadMass: 17.2, mountingAngle: 30 } }, ['stop']],
    ['12 kg however it is mounted', { setup: { payloadMass: 12, mountingAngle: undefined } }, []],
    ['12.1 kg at no known angle', { setup: { payloadMass: 12.1, mountingAngle: undefined } }, ['unknown']],
  ],
  'stopping-room': [
    // 200 mm/s at 2000 mm/s² brake from 10 mm before the target; a quick stop of 1000 mm/s² takes 20 mm: 10 mm beyond it.
    ['just before the hard stop at 201 mm', { setup: { quickStopDeceleration: 1000 }, moves: [absolute(1, 191, { speed: 200 })] }, []],
    ['0.001 mm into it', { setup: { quickStopDeceleration: 1000 }, moves: [absolute(1, 191.001, { speed: 200 })] }, ['warn']],
    ['without a quick stop', { setup: { quickStopDeceleration: undefined } }, ['unknown']],
  ],
}

describe.each(Object.entries(cases))('%s', holdsCases)

describe('the rules above', () => {
  it('are the first twenty of the table, in its order', () => expect(Object.keys(cases)).toEqual(rules.slice(0, 20).map(({ id }) => id)))
  it('reach each level that they have, and pass', () => reachesItsLevels(cases))
})
