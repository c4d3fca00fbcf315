import { describe } from 'vitest'
import type { Move, Setup } from '../../../../shared/settings/types'
import { absolute, plate, press, relative, rotary, soundSetup } from '../../../support/check-input'
import { holdsCasesOn, type Case, type Change, type Sound } from '../../../support/rule-cases'

/*
 * The rules that count in turns and torques, on one sound table: 100 kg·cm² on a rotor of 2 kg·cm² behind a gear of 5, so
 * 100 + 2·5² = 150 kg·cm² = 0.015 kg·m²; 8 N·m rated, 16 N·m peak; soft limits 0 to 328 deg, hard stops at −1 and 331 deg.
 * deg/s² count as rad/s²: 3600 deg/s² are 62.8318531 rad/s², and those ask 0.9424778 N·m of that inertia.
 */

const { payloadMass: _mass, frictionForce: _friction, ...shared } = soundSetup
const table: Sound = {
  content: rotary,
  setup: { ...shared, softLimitMax: 328, positiveDirection: 'clockwise', payloadInertia: 100, frictionTorque: 0.1, unbalanceTorque: 0 } as Setup,
  plate: plate({
    axisKind: 'rotary', stroke: 330, hardMargin: 1, maxSpeed: 800, maxAcceleration: 9000, pressForceMin: 5, pressForceMax: 90, maxPressSpeed: 90, ratedThrust: 8, peakThrust: 16, rotorInertia: 2, gearRatio: 5,
    resolution: 0.001, repeatability: 0.02, inputFilterTime: 2, maxPayloadInertia: 100, maxOverloadTime: 1000, brakeFitted: false, brakeCloseTime: 40, brakeHolding: 9, dictionary: {},
  }),
}
const quick = (move: number, target: number): Move => absolute(move, target, { acceleration: 3600 })
/** The shaft at 30° from vertical with 4 N·m off its centre: 4 · sin 30° = 2 N·m either way. */
const tilted = { mountingAngle: 30, unbalanceTorque: 4 }
const brake: Change['plate'] = { brakeFitted: true, brakeHolding: 9 }

const cases: Readonly<Record<string, readonly Case[]>> = {
  'thrust-needed': [
    // 0.9424778 + 0.1 N·m of friction = 1.0424778 N·m; of 8 N·m 13.030973 %, and as 80 % of a limit 16.288716 %.
    ['16.29 %', { setup: { thrustLimit: 16.29 }, moves: [quick(1, 90)] }, []],
    ['16.28 %', { setup: { thrustLimit: 16.28 }, moves: [quick(1, 90)] }, ['warn']],
    ['13.04 %', { setup: { thrustLimit: 13.04 }, moves: [quick(1, 90)] }, ['warn']],
    ['13.03 %', { setup: { thrustLimit: 13.03 }, moves: [quick(1, 90)] }, ['stop']],
    // With the unbalance 3.0424778 N·m, 38.030973 %.
    ['tilted: 38.04 %', { setup: { ...tilted, thrustLimit: 38.04 }, moves: [quick(1, 90)] }, ['warn']],
    ['tilted: 38.03 %', { setup: { ...tilted, thrustLimit: 38.03 }, moves: [quick(1, 90)] }, ['stop']],
    // Without a gear the rotor counts once: 102 kg·cm², 0.6408849 + 0.1 N·m = 0.7408849 N·m, 9.261061 %.
    ['no gear: 9.27 %', { setup: { thrustLimit: 9.27 }, plate: { gearRatio: undefined }, moves: [quick(1, 90)] }, ['warn']],
    ['no gear: 9.26 %', { setup: { thrustLimit: 9.26 }, plate: { gearRatio: undefined }, moves: [quick(1, 90)] }, ['stop']],
    ['without an inertia', { setup: { payloadInertia: undefined }, moves: [quick(1, 90)] }, ['unknown']],
  ],
  'thrust-rms': [
    // Held at its worst without end: 2 N·m, 85 % of 2.352941 N·m.
    ...([[2.36, []], [2.35, ['warn']], [2, ['warn']], [1.99, ['stop']]] as const).map(([ratedThrust, levels]): Case =>
      [`2 N·m held without end of ${ratedThrust} N·m`, { setup: tilted, plate: { ratedThrust }, moves: [absolute(1, 50, { next: 1, dwell: 1000 })] }, levels]),
    ['with the shaft upright nothing is held', { setup: { ...tilted, mountingAngle: 0 }, plate: { ratedThrust: 0.001 }, moves: [absolute(1, 50, { next: 1, dwell: 1000 })] }, []],
  ],
  'payload': [
    ['100 kg·cm²', {}, []],
    ['100.1 kg·cm²', { setup: { payloadInertia: 100.1 } }, ['stop']],
    ['whatever the tilt', { setup: { mountingAngle: 90 } }, []],
    ['without a maximum', { plate: { maxPayloadInertia: undefined } }, ['unknown']],
  ],
  'press-arrives': [
    // 2 N·m of unbalance and 0.1 N·m of friction are 26.25 % of 8 N·m: just as much never gets there.
    ['26.251 %', { setup: tilted, moves: [press(1, 50, 60, { forceLimit: 26.251 })] }, []],
    ['26.25 %', { setup: tilted, moves: [press(1, 50, 60, { forceLimit: 26.25 })] }, ['stop']],
    ['either way round', { setup: tilted, moves: [press(1, 60, 50, { forceLimit: 26.25 })] }, ['stop']],
    // What is off the centre pulls back with 2 − 0.1 N·m at its worst: 23.75 %. A press that must hold it has more than that already.
    ['holding it back', { setup: tilted, plate: { forceLimitActsBothWays: true }, moves: [press(1, 50, 60, { forceLimit: 26.26 })] }, []],
  ],
  'press-speed': [
    // ½ · 0.015 kg·m² · (60 deg/s = 1.0471976 rad/s)² = 0.0082246703 J.
    ['a blow of 0.00822 J', { plate: { maxImpactEnergy: 0.008225 }, moves: [press(1, 50, 60, { pressSpeed: 60 })] }, []],
    ['and less allowed', { plate: { maxImpactEnergy: 0.008224 }, moves: [press(1, 50, 60, { pressSpeed: 60 })] }, ['warn']],
    ['without an inertia', { setup: { payloadInertia: undefined }, plate: { maxImpactEnergy: 0.01 }, moves: [press(1, 50, 60)] }, ['unknown']],
  ],
  'homing-plausible': [
    ['26.25 % against 2.1 N·m', { setup: { ...tilted, homingForceLimit: 26.25 } }, []],
    ['26.24 %', { setup: { ...tilted, homingForceLimit: 26.24 } }, ['stop']],
    ['a blow at 60 deg/s', { setup: { homingSpeed: 60 }, plate: { maxImpactEnergy: 0.008224 } }, ['warn']],
  ],
  'brake-vertical': [
    // Friction of 2 N·m holds 2 N·m.
    ['held by its friction', { setup: { ...tilted, frictionTorque: 2, onEnableLoss: 'release' } }, []],
    ['not held by 1.99 N·m', { setup: { ...tilted, frictionTorque: 1.99, onEnableLoss: 'release' } }, ['stop']],
    // 1.5 · 2 = 3 N·m.
    ['a brake of 3 N·m', { setup: { ...tilted, brakeFitted: true, brakeEngageDelay: 40 }, plate: { ...brake, brakeHolding: 3 } }, []],
    ['a brake of 2.99 N·m', { setup: { ...tilted, brakeFitted: true, brakeEngageDelay: 40 }, plate: { ...brake, brakeHolding: 2.99 } }, ['warn']],
    ['nothing off its centre', { setup: { mountingAngle: 30 } }, 'not applicable'],
  ],
  'stopping-room': [
    // 200 deg/s at 2000 deg/s² brake from 10 deg before the target; a quick stop of 1000 deg/s² takes 20 deg.
    ['just before the hard stop at 331 deg', { setup: { quickStopDeceleration: 1000 }, moves: [absolute(1, 321, { speed: 200 })] }, []],
    ['0.001 deg into it', { setup: { quickStopDeceleration: 1000 }, moves: [absolute(1, 321.001, { speed: 200 })] }, ['warn']],
    // (0.4 % of 8 N·m + 0.1 N·m)/0.015 kg·m² = 8.8 rad/s² = 504.2 deg/s²: softer than asked, 39.67 deg instead of 20.
    ['what the torque can do counts', { setup: { quickStopDeceleration: 1000, thrustLimit: 0.4 }, moves: [absolute(1, 302, { speed: 200 })] }, ['warn']],
    ['a table that turns past every place', { setup: { modulo: 360 } }, 'not applicable'],
  ],
  'travel-span': [
    ['a whole turn of 360 deg', { setup: { modulo: 360, softLimitMax: 360 } }, []],
    ['a tenth of a degree more', { setup: { modulo: 360, softLimitMax: 360.1 } }, ['stop']],
    ['limits off', { setup: { modulo: 360, softLimitsActive: false } }, 'not applicable'],
  ],
  'zone-reach': [
    ['over the turn, and one that begins where it ends', { setup: { modulo: 360, softLimitsActive: false }, content: { zones: [{ zone: 1, from: 350, to: 10 }, { zone: 2, from: 10, to: 20 }] } }, []],
    ['over the turn, and one that begins before it ends', { setup: { modulo: 360, softLimitsActive: false }, content: { zones: [{ zone: 1, from: 350, to: 10 }, { zone: 2, from: 9, to: 20 }] } }, ['note']],
  ],
  'relative-step': [
    // floor(328/164) = 2 steps from end to end.
    ['164 deg', { moves: [relative(1, 164)] }, ['note']],
    ['164.1 deg', { moves: [relative(1, 164.1)] }, ['warn']],
    ['328.1 deg', { moves: [relative(1, -328.1)] }, ['stop']],
    ['turning on for ever', { setup: { modulo: 360, softLimitsActive: false }, moves: [relative(1, 500)] }, 'not applicable'],
  ],
}

describe.each(Object.entries(cases))('%s on a table', holdsCasesOn(table))
