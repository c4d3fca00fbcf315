import type { UnitByKind } from './fields'
import type { Weight } from './types'

/*
 * The tables of move and zone fields, in the order of the screens. A move's own number (`move`) and a zone's (`zone`) name
 * the row and are not fields of it.
 */

export interface RowField {
  readonly label: string
  readonly help: string
  readonly type: 'number' | 'text' | 'choice' | 'row'
  readonly unit?: UnitByKind
  readonly weight: Weight
  readonly watched: boolean
  /** Always there. */
  readonly needed: boolean
  readonly plusMinus?: true
}

const length: UnitByKind = { linear: 'mm', rotary: 'deg' }
const speed: UnitByKind = { linear: 'mm/s', rotary: 'deg/s' }
const acceleration: UnitByKind = { linear: 'mm/s²', rotary: 'deg/s²' }
const percent: UnitByKind = { linear: '%', rotary: '%' }
const time: UnitByKind = { linear: 'ms', rotary: 'ms' }

export const moveFields = {
  label: { label: 'label', type: 'text', weight: 'text', watched: false, needed: false, help: 'What the move is called, up to 40 characters.' },
  comment: { label: 'comment', type: 'text', weight: 'text', watched: false, needed: false, help: 'Up to 200 characters.' },
  kind: { label: 'kind', type: 'choice', weight: 'harm', watched: true, needed: true, help: 'absolute, relative or press.' },
  target: { label: 'target', type: 'number', unit: length, weight: 'motion', watched: true, needed: true, help: 'End position; of a relative move the signed distance; of a press the furthest position.' },
  turn: { label: 'turn', type: 'choice', weight: 'motion', watched: true, needed: false, help: 'Which way round on a modulo axis: signed, positive, negative, shortest. Absent means signed.' },
  speed: { label: 'speed', type: 'number', unit: speed, weight: 'motion', watched: true, needed: true, help: 'Above 0; 0 together with acceleration 0 marks an unused row.' },
  acceleration: { label: 'accel.', type: 'number', unit: acceleration, weight: 'motion', watched: true, needed: true, help: 'Above 0; 0 together with speed 0 marks an unused row.' },
  deceleration: { label: 'decel.', type: 'number', unit: acceleration, weight: 'motion', watched: true, needed: false, help: 'Absent means as acceleration.' },
  forceLimit: { label: 'force', type: 'number', unit: percent, weight: 'harm', watched: true, needed: false, help: 'Most thrust or torque during this move, of the rated one. A press needs it.' },
  approach: { label: 'approach', type: 'number', unit: length, weight: 'harm', watched: true, needed: false, help: 'Where the slow, force-limited part of a press begins.' },
  pressSpeed: { label: 'press speed', type: 'number', unit: speed, weight: 'harm', watched: true, needed: false, help: 'Speed of that slow part. Absent means the press speed of the setup.' },
  window: { label: 'window', type: 'number', unit: length, weight: 'motion', watched: true, needed: false, plusMinus: true, help: 'In-position window of this move.' },
  next: { label: 'then', type: 'row', weight: 'motion', watched: true, needed: false, help: 'The move that follows by itself.' },
  dwell: { label: 'dwell', type: 'number', unit: time, weight: 'motion', watched: true, needed: false, help: 'Wait before the following move; refused without one.' },
} as const satisfies Record<string, RowField>

export const zoneFields = {
  from: { label: 'from', type: 'number', unit: length, weight: 'harm', watched: true, needed: true, help: 'The output is on from here.' },
  to: { label: 'to', type: 'number', unit: length, weight: 'harm', watched: true, needed: true, help: 'The output is on up to here.' },
} as const satisfies Record<string, RowField>

export type MoveFieldName = keyof typeof moveFields
export type ZoneFieldName = keyof typeof zoneFields
export const moveFieldNames = Object.keys(moveFields) as MoveFieldName[]
export const zoneFieldNames = Object.keys(zoneFields) as ZoneFieldName[]

/** Kept, so that its emptiness is restored, and skipped by rules: speed 0 and acceleration 0. */
export function isUnused(move: { readonly speed: number, readonly acceleration: number }): boolean {
  return move.speed === 0 && move.acceleration === 0
}
