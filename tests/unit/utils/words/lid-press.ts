import type { Content } from '../../../../shared/settings/types'
import type { Nameplate } from '../../../../shared/settings/nameplate'

/* An invented lid press before and after a night shift: a thrust limit raised, a second press put in as row 3. */

export const nameplate: Nameplate = { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640 }

export const before: Content = {
  axisKind: 'linear', extra: { 'K-017': 4 }, zones: [{ zone: 0, from: 0, to: 12 }],
  setup: { softLimitMin: 2, softLimitMax: 185, thrustLimit: 38, positionGain: 45, inPositionWindow: 0.05, inputSwitching: 'p', selectInputs: 3 },
  moves: [
    { move: 0, label: 'Top, rest', kind: 'absolute', target: 5, speed: 250, acceleration: 2000 },
    { move: 1, label: 'Over lid', kind: 'absolute', target: 62, speed: 250, acceleration: 2000 },
    { move: 2, label: 'Seat lid', kind: 'press', target: 104, approach: 88, speed: 180, acceleration: 1500, forceLimit: 32 },
    { move: 3, label: 'Ease off', kind: 'absolute', target: 96.5, speed: 40, acceleration: 500, next: 4, dwell: 120 },
    { move: 4, label: 'Clear lid', kind: 'absolute', target: 62, speed: 250, acceleration: 2500, next: 5, dwell: 0 },
    { move: 5, label: 'Up', kind: 'absolute', target: 5, speed: 300, acceleration: 2500 },
  ],
}

export const after: Content = {
  ...before,
  setup: { ...before.setup, thrustLimit: 55, positionGain: 52, inPositionWindow: 0.1 },
  moves: [
    { move: 0, label: 'Top, rest', kind: 'absolute', target: 5, speed: 250, acceleration: 2000 },
    { move: 1, label: 'Over lid', kind: 'absolute', target: 70, speed: 320, acceleration: 2000, deceleration: 2000 },
    { move: 2, label: 'Seat lid, first', kind: 'press', target: 104, approach: 88, speed: 180, acceleration: 1500, forceLimit: 36 },
    { move: 3, label: 'Seat lid, again', kind: 'press', target: 104, approach: 98, speed: 60, acceleration: 800, forceLimit: 36 },
    { move: 4, label: 'Ease off', kind: 'absolute', target: 96.5, speed: 40, acceleration: 500, next: 5, dwell: 120 },
    { move: 5, label: 'Clear lid', kind: 'absolute', target: 62, speed: 250, acceleration: 2500, next: 6, dwell: 0 },
    { move: 6, label: 'Up', kind: 'absolute', target: 5, speed: 300, acceleration: 2500 },
  ],
}
