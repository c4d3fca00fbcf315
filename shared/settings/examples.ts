import { type SettingsFile, schemaName } from './types'

/*
 * Invented files for the page that explains the format and for tests: a lid press that moves up and down, a turntable that
 * wraps, and the least that a file can be.
 */

export const pressExample: SettingsFile = {
  schema: schemaName,
  unit: { serial: 'HL40-2231-0087', model: 'HL40-200V', firmware: '3.12', actuatorSerial: 'A-55810', actuatorModel: 'HL40-200' },
  exportedAt: '2026-11-30T08:15:00+01:00',
  exportedBy: 'Tobias Achterberg',
  note: 'After the new lid gasket.',
  axisKind: 'linear',
  setup: {
    positiveDirection: 'extend', softLimitsActive: true, softLimitMin: 0, softLimitMax: 180, homeOffset: 2.35,
    homingMethod: 'hard-stop', homingDirection: 'negative', homingSpeed: 20, homingCreepSpeed: 5, homingForceLimit: 40,
    speedLimit: 400, accelerationLimit: 4000, quickStopDeceleration: 6000, jogSpeed: 50, pressSpeed: 15,
    inPositionWindow: 0.05, inPositionTime: 20, followingErrorWindow: 2, followingErrorTime: 50,
    thrustLimit: 90, overloadLevel: 110, overloadTime: 300, payloadMass: 6.5, mountingAngle: -90, frictionForce: 25,
    positionGain: 45, velocityGain: 1850, velocityIntegralTime: 12, inputSwitching: 'p', outputSwitching: 'p', selectInputs: 3,
    selectSettleTime: 10, startPulseTime: 20, onEnableLoss: 'stop-and-hold', brakeFitted: true, brakeReleaseDelay: 80, brakeEngageDelay: 120,
  },
  zones: [{ zone: 1, from: 0, to: 5 }, { zone: 2, from: 140, to: 165 }],
  moves: [
    { move: 0, label: 'up', kind: 'absolute', target: 0, speed: 300, acceleration: 2500 },
    { move: 1, label: 'over the lid', kind: 'absolute', target: 120, speed: 250, acceleration: 2000, deceleration: 1500 },
    { move: 2, label: 'press the lid', comment: 'Clicks at about 158 mm.', kind: 'press', target: 165, speed: 100, acceleration: 1000, forceLimit: 38, approach: 150, pressSpeed: 12 },
    { move: 3, label: 'let go', kind: 'relative', target: -10, speed: 60, acceleration: 800, next: 0, dwell: 150 },
    { move: 7, kind: 'absolute', target: 0, speed: 0, acceleration: 0 },
  ],
  extra: { 'K-017': 15, 'Filter': 'B', 'Recipe': '007', 'Ramp': { value: 3, unit: 'counts' }, 'Buzzer': false },
  readings: { operatingHours: 8123, cycles: 4210557, boardTemperature: { value: 41.5, unit: '°C' } },
}

export const turntableExample: SettingsFile = {
  schema: schemaName,
  unit: { serial: 'HR16-1009-0311', channel: 2, model: 'HR16', firmware: '1.4' },
  exportedAt: '2026-11-30T09:02:30Z',
  axisKind: 'rotary',
  setup: {
    positiveDirection: 'clockwise', modulo: 360, homingMethod: 'index-pulse', homingDirection: 'positive', homingSpeed: 30,
    homeOffset: -12.5, speedLimit: 720, accelerationLimit: 3600, thrustLimit: 80, payloadInertia: 145.2, unbalanceTorque: 0.8,
    inPositionWindow: 0.1, selectInputs: 0, nodeAddress: 17, onEnableLoss: 'release', brakeFitted: false,
  },
  zones: [{ zone: 1, from: 350, to: 10 }],
  moves: [
    { move: 0, label: 'jar in', kind: 'absolute', target: 0, turn: 'shortest', speed: 360, acceleration: 1800 },
    { move: 1, label: 'one station on', kind: 'relative', target: 45, turn: 'positive', speed: 180, acceleration: 1200, window: 0.2 },
  ],
  extra: {},
  readings: {},
}

export const leastExample: SettingsFile = {
  schema: schemaName,
  unit: { serial: 'HL25-0005', model: 'HL25-100' },
  exportedAt: '2026-11-30T10:00:00Z',
  axisKind: 'linear',
  setup: {}, zones: [], moves: [], extra: {}, readings: {},
}

export const exampleFiles: readonly SettingsFile[] = [pressExample, turntableExample, leastExample]
