import { describe, expect, it } from 'vitest'
import { diffContents } from '../../../../shared/diff/diff'
import type { DiffContext } from '../../../../shared/diff/types'
import { setupField, setupFieldNames } from '../../../../shared/settings/fields'
import { axisFlags, type Content, type Move, type Setup, type SetupFieldName } from '../../../../shared/settings/types'
import { absolute, linear, press, rotary } from '../../../support/check-input'

/*
 * What a change of each value weighs and whether it is watched, typed from the tables of the format and held against whole
 * differences: a limit that slid from harm to motion would let a change pass unsigned.
 */
const motion = ['homingAcceleration', 'jerk', 'smoothingTime', 'frictionForce', 'frictionTorque']
const watchedMotion = ['inPositionWindow', 'inPositionTime', 'positionGain', 'velocityGain', 'velocityIntegralTime', 'velocityFeedForward', 'inertiaRatio', 'notchFrequency']
const harm = [
  'positiveDirection', 'softLimitsActive', 'softLimitMin', 'softLimitMax', 'homeOffset', 'modulo', 'homingMethod', 'homingDirection', 'homingSpeed', 'homingCreepSpeed', 'homingForceLimit', 'speedLimit',
  'accelerationLimit', 'decelerationLimit', 'quickStopDeceleration', 'jogSpeed', 'pressSpeed', 'followingErrorWindow', 'followingErrorTime', 'thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative',
  'overloadLevel', 'overloadTime', 'payloadMass', 'payloadInertia', 'mountingAngle', 'unbalanceTorque', 'inputSwitching', 'outputSwitching', 'selectInputs', 'selectSettleTime', 'startPulseTime',
  'onEnableLoss', 'brakeFitted', 'brakeReleaseDelay', 'brakeEngageDelay', 'nodeAddress',
]
/** Fields of a move and what they weigh on an axis without a flag; label and comment weigh text on every axis. */
const moveWeights = {
  label: 'text', comment: 'text', kind: 'harm', target: 'motion', speed: 'motion', acceleration: 'motion', deceleration: 'motion', forceLimit: 'harm', approach: 'harm', pressSpeed: 'harm', window: 'motion', next: 'motion', dwell: 'motion',
} as const

const told = (before: Content, after: Content, context: DiffContext = {}) => diffContents(before, after, context).map(({ field, weight, watched }) => `${field} ${weight}${watched ? ', watched' : ''}`)

/** Two values that a field may have, on an axis that has the field. */
function values(name: SetupFieldName): readonly [Content, Content] {
  const field = setupField(name)
  const kind = field?.type === 'number' && field.unit.linear === null ? 'rotary' : 'linear'
  const [one, other] = field?.type === 'flag' ? [false, true] : field?.type === 'choice' ? field.choices[kind] : [1, 2]
  const make = kind === 'linear' ? linear : rotary
  return [make({ [name]: one } as Setup), make({ [name]: other } as Setup)]
}

describe('a change in the setup', () => {
  it('is of a field of these lists, each in one', () => expect([...motion, ...watchedMotion, ...harm].sort()).toEqual([...setupFieldNames].sort()))

  it.each(setupFieldNames)('%s', (name) => {
    const weight = harm.includes(name) ? 'harm, watched' : watchedMotion.includes(name) ? 'motion, watched' : 'motion'
    const [before, after] = values(name)
    for (const flags of [[], [...axisFlags]]) expect(told(before, after, { flags })).toEqual([`${name} ${weight}`])
    // Not set, or no longer set, weighs as much.
    expect(told({ ...before, setup: {} }, after)).toEqual([`${name} ${weight}`])
    expect(told(before, { ...before, setup: {} })).toEqual([`${name} ${weight}`])
  })

  it('is watched where planners of the site say so, whatever it weighs', () => {
    const [before, after] = values('jerk')
    expect(told(before, after, { watched: ['jerk'] })).toEqual(['jerk motion, watched'])
    expect(told(before, after, { watched: ['move.jerk', 'extra:jerk'] })).toEqual(['jerk motion'])
  })
})

describe('a change in a move', () => {
  const base: Move = press(5, 120, 150, { label: 'a', comment: 'a', deceleration: 1000, window: 0.1, next: 6, dwell: 100 })
  const after: Readonly<Record<keyof typeof moveWeights, unknown>> = {
    label: 'b', comment: 'b', kind: 'absolute', target: 151, speed: 251, acceleration: 2001, deceleration: 1001, forceLimit: 31, approach: 121, pressSpeed: 11, window: 0.2, next: 7, dwell: 101,
  }
  const changed = (field: keyof typeof moveWeights, context: DiffContext) => told(linear({}, [base]), linear({}, [{ ...base, [field]: after[field] }]), context)

  it.each(Object.entries(moveWeights))('%s weighs %s, and harm instead of motion on an axis with any flag', (name, weight) => {
    const field = name as keyof typeof moveWeights
    const watched = weight === 'text' ? '' : ', watched'
    expect(changed(field, {})).toEqual([`${field} ${weight}${watched}`])
    for (const flag of axisFlags) expect(changed(field, { flags: [flag] })).toEqual([`${field} ${weight === 'motion' ? 'harm' : weight}${watched}`])
  })

  it('a row that comes or goes weighs harm by its kind', () => {
    const one = linear({}, [absolute(1, 9)])
    expect(told(linear(), one)).toEqual(['kind harm, watched', 'target motion, watched', 'speed motion, watched', 'acceleration motion, watched'])
    expect(told(one, linear())).toEqual(told(linear(), one))
  })

  it('which way round a turning axis goes is motion', () => {
    const turn = (way: 'positive' | 'negative') => rotary({ modulo: 360 }, [absolute(1, 9, { turn: way })])
    expect(told(turn('positive'), turn('negative'))).toEqual(['turn motion, watched'])
  })
})

describe('a change elsewhere', () => {
  it('of a zone weighs harm, as an interlock may hang on it', () => {
    const zone = (from: number, to: number) => linear({}, [], { zones: [{ zone: 1, from, to }] })
    expect(told(zone(1, 5), zone(2, 6))).toEqual(['from harm, watched', 'to harm, watched'])
    expect(told(linear(), zone(1, 5))).toEqual(['from harm, watched', 'to harm, watched'])
  })

  it('of the drive’s own weighs motion until the dictionary says otherwise', () => {
    const own = (value: number) => linear({}, [], { extra: { 'K-1': value } })
    expect(told(own(1), own(2))).toEqual(['K-1 motion'])
    expect(told(own(1), own(2), { dictionary: { 'K-1': { weight: 'harm' } } })).toEqual(['K-1 harm, watched'])
    expect(told(own(1), own(2), { dictionary: { 'K-1': { weight: 'text' } }, watched: ['extra:K-1'] })).toEqual(['K-1 text, watched'])
    expect(told(own(1), own(2), { dictionary: { 'K-2': { weight: 'harm' } }, flags: [...axisFlags] })).toEqual(['K-1 motion'])
  })

  it('of the kind of axis weighs harm', () => expect(told(linear(), rotary())).toEqual(['axisKind harm, watched']))
})
