import type { Move, Setup } from '../shared/settings/types'

/*
 * A settings file like those that a plant sends every night: 40 setup values, 64 moves, pretty JSON of about 14 kB.
 */

export const sampleSetup: Setup = {
  positiveDirection: 'extend', softLimitsActive: true, softLimitMin: -2, softLimitMax: 198, homeOffset: 3.5, homingMethod: 'hard-stop',
  homingDirection: 'negative', homingSpeed: 20, homingCreepSpeed: 5, homingAcceleration: 500, homingForceLimit: 30, speedLimit: 600,
  accelerationLimit: 5000, decelerationLimit: 5000, quickStopDeceleration: 8000, jogSpeed: 30, pressSpeed: 8, smoothingTime: 4,
  inPositionWindow: 0.05, inPositionTime: 10, followingErrorWindow: 2, followingErrorTime: 50, thrustLimit: 80, overloadLevel: 120,
  overloadTime: 500, payloadMass: 4.2, mountingAngle: 90, frictionForce: 11, positionGain: 40, velocityGain: 2.375, velocityIntegralTime: 12,
  velocityFeedForward: 60, inertiaRatio: 310, notchFrequency: 420, inputSwitching: 'p', outputSwitching: 'p', selectInputs: 6,
  selectSettleTime: 8, startPulseTime: 12, onEnableLoss: 'stop-and-hold', brakeFitted: true, nodeAddress: 14,
}

const moves = Array.from({ length: 64 }, (_, move): Move => ({
  move, label: `Station ${move % 12}`, kind: 'absolute', target: (move * 37 % 1950) / 10, speed: 100 + move * 7 % 400, acceleration: 2000 + move % 5 * 250, deceleration: 2500, window: 0.1, ...(move % 2 === 0 ? { comment: 'with a part in the gripper, belt running' } : {}),
}))

export const sampleSerial = 'LP-2207-0148'

/** The file with one move's speed changed by `change`, as bytes; each change gives another content. */
export function sampleFile(change: number, exportedAt?: string): Buffer {
  const at = change % moves.length
  return fileOf(moves.map(move => (move.move === at ? { ...move, speed: move.speed + 1 + change } : move)), exportedAt)
}

/** A file of the same unit with other moves, as bytes. */
export function fileOf(moves: readonly Move[], exportedAt = '2026-11-30T08:15:00+01:00'): Buffer {
  const file = { schema: 'witnessmark.axis-settings/1', unit: { serial: sampleSerial, model: 'HL40-200V', firmware: '2.4' }, exportedAt, axisKind: 'linear', setup: sampleSetup, zones: [{ zone: 1, from: 10, to: 25 }], moves, extra: { 'K-017': 15, 'Filter': 'B' }, readings: { operatingHours: 8123 } }
  return Buffer.from(JSON.stringify(file, null, 1), 'utf8')
}
