import { describe, expect, it } from 'vitest'
import { setupFieldNames } from '../../../../shared/settings/fields'
import type { Carry, Setup, SetupFieldName } from '../../../../shared/settings/types'
import { carriedValues, type CarryCase } from '../../../../shared/swap/carried'
import { linear, plate, rotary } from '../../../support/check-input'

/*
 * The carry classes as the format's table of setup fields has them, typed from there and not read from the code. On a swap
 * `place` goes along like a copy; it only never goes to a sister.
 */
const place = ['positiveDirection', 'softLimitMin', 'softLimitMax', 'mountingAngle', 'unbalanceTorque', 'inputSwitching', 'outputSwitching', 'selectInputs', 'nodeAddress']
const friction = ['frictionForce', 'frictionTorque']
const tuning = ['positionGain', 'velocityGain', 'velocityIntegralTime', 'velocityFeedForward', 'inertiaRatio', 'notchFrequency']
const copied = [
  'softLimitsActive', 'modulo', 'homingMethod', 'homingDirection', 'homingSpeed', 'homingCreepSpeed', 'homingAcceleration', 'homingForceLimit', 'speedLimit', 'accelerationLimit', 'decelerationLimit',
  'quickStopDeceleration', 'jogSpeed', 'pressSpeed', 'jerk', 'smoothingTime', 'inPositionWindow', 'inPositionTime', 'followingErrorWindow', 'followingErrorTime', 'thrustLimit', 'thrustLimitPositive',
  'thrustLimitNegative', 'overloadLevel', 'overloadTime', 'payloadMass', 'payloadInertia', 'selectSettleTime', 'startPulseTime', 'onEnableLoss', 'brakeFitted', 'brakeReleaseDelay', 'brakeEngageDelay',
]

const swap = (more: Partial<CarryCase> = {}): CarryCase => ({ replaced: 'unit', ownValues: false, out: { model: 'A', firmware: '1' }, into: { model: 'A', firmware: '1' }, ...more })
/** A value of every field; what it is does not matter to the class, the homing method aside. */
const everything = Object.fromEntries(setupFieldNames.map(name => [name, 1])) as Setup
const told = (one: CarryCase, setup: Setup = everything) => carriedValues(rotary(setup), one)
const classes = (one: CarryCase) => Object.fromEntries(told(one).map(({ field = '', carry }) => [field, carry])) as Record<SetupFieldName, Carry>
const of = (names: readonly string[], one: CarryCase) => [...new Set(names.map(name => classes(one)[name as SetupFieldName]))]

describe('the class of each setup value, by what is replaced', () => {
  it('the table above names every field once, the home offset aside', () => {
    expect([...place, ...friction, ...tuning, ...copied, 'homeOffset'].sort()).toEqual([...setupFieldNames].sort())
  })

  it.each([
    ['unit', { place: ['place'], friction: ['prove'], tuning: ['prove'], copied: ['copy'] }],
    ['drive', { place: ['place'], friction: ['copy'], tuning: ['prove'], copied: ['copy'] }],
    ['actuator', { place: ['place'], friction: ['prove'], tuning: ['prove'], copied: ['copy'] }],
  ] as const)('%s, same model and firmware', (replaced, expected) => {
    const one = swap({ replaced })
    expect({ place: of(place, one), friction: of(friction, one), tuning: of(tuning, one), copied: of(copied, one) }).toEqual(expected)
  })

  it.each(['unit', 'drive'] as const)('%s: tuning is proved on one model and firmware only', (replaced) => {
    expect(of(tuning, swap({ replaced, into: { model: 'A', firmware: '2' } }))).toEqual(['teach'])
    expect(of(tuning, swap({ replaced, into: { model: 'B', firmware: '1' } }))).toEqual(['teach'])
    expect(of(tuning, swap({ replaced, into: { model: 'A' } }))).toEqual(['teach'])
    expect(of(tuning, swap({ replaced, out: { model: 'A' } }))).toEqual(['teach'])
    // Two firmwares that nobody noted are not known to be one.
    expect(of(tuning, swap({ replaced, out: { model: 'A' }, into: { model: 'A' } }))).toEqual(['teach'])
  })

  it('actuator: the drive stays, so its firmware does not count; a model of its own, else the unit’s, does', () => {
    const actuators = (out?: string, into?: string, unit = 'A') => swap({
      replaced: 'actuator', out: { model: 'A', firmware: '1', ...out === undefined ? {} : { actuatorModel: out } }, into: { model: unit, firmware: '2', ...into === undefined ? {} : { actuatorModel: into } },
    })
    expect(of(tuning, actuators('HA', 'HA'))).toEqual(['prove'])
    expect(of(tuning, actuators('HA', 'HB'))).toEqual(['teach'])
    expect(of(tuning, actuators())).toEqual(['prove'])
    expect(of(tuning, actuators(undefined, undefined, 'B'))).toEqual(['teach'])
    expect(of(tuning, actuators('HA'))).toEqual(['teach'])
  })

  it('a unit’s own values are all copied, whatever is replaced', () => {
    for (const replaced of ['unit', 'drive', 'actuator'] as const) {
      expect(new Set(told(swap({ replaced, ownValues: true })).map(({ carry, why }) => `${carry}: ${why}`))).toEqual(new Set(['copy: It is this unit’s own value.']))
    }
  })
})

describe('why, in one sentence', () => {
  const why = (field: string, one: CarryCase, setup: Setup = everything) => told(one, setup).find(value => value.field === field)?.why

  it('by class', () => {
    expect(why('speedLimit', swap())).toBe('It belongs to the job.')
    expect(why('softLimitMax', swap())).toBe('It belongs to the place of this axis, which stays.')
    expect(why('frictionForce', swap())).toBe('It is copied, and proved at the machine: another unit may need another.')
    expect(why('frictionForce', swap({ replaced: 'drive' }))).toBe('The actuator and what it moves stay: its friction is the same.')
  })

  it('of tuning, by what was the same or another', () => {
    expect(why('positionGain', swap())).toBe('Copied, and proved at the machine: same model and firmware.')
    expect(why('positionGain', swap({ into: { model: 'B' } }))).toBe('Tuned anew: another model or firmware.')
    expect(why('positionGain', swap({ replaced: 'actuator' }))).toBe('Copied, and proved at the machine: actuator of the same model.')
    expect(why('positionGain', swap({ replaced: 'actuator', into: { model: 'A', actuatorModel: 'HB' } }))).toBe('Tuned anew: another model of actuator.')
  })

  it('where the actuator is replaced: the rest stays in the drive, the brake’s times against the new brake', () => {
    const actuator = swap({ replaced: 'actuator' })
    expect(why('thrustLimit', actuator)).toBe('It stays in the drive.')
    expect(['brakeFitted', 'brakeReleaseDelay', 'brakeEngageDelay'].map(field => why(field, actuator))).toEqual(Array(3).fill('It stays in the drive; judged against the brake of the new actuator.'))
    expect(why('frictionTorque', actuator)).toBe('It is copied, and proved at the machine: another unit may need another.')
    expect(why('brakeEngageDelay', swap())).toBe('It belongs to the job.')
  })

  const home = (homingMethod: Setup['homingMethod'], replaced: CarryCase['replaced'] = 'unit') =>
    why('homeOffset', swap({ replaced }), homingMethod === undefined ? { homeOffset: 3 } : { homeOffset: 3, homingMethod })
  it('of the home offset, by the homing method and by what keeps the encoder', () => {
    expect(home('hard-stop')).toBe('Home is found again by hard-stop: copied, and proved at the scribed mark.')
    expect(home('limit-switch', 'actuator')).toBe('Home is found again by limit-switch: copied, and proved at the scribed mark.')
    expect(home('index-pulse', 'drive')).toBe('The encoder is the actuator’s, which stays: copied, and proved at the scribed mark.')
    expect(home('absolute-encoder', 'drive')).toBe('The encoder is the actuator’s, which stays: copied, and proved at the scribed mark.')
    expect(home('absolute-encoder')).toBe('Taught at the machine: its encoder counts from another place.')
    expect(home('index-pulse', 'actuator')).toBe('Taught at the machine: its encoder counts from another place.')
    expect(home('current-position', 'drive')).toBe('Taught at the machine: home is where it was set.')
    expect(home(undefined)).toBe('Taught at the machine: no homing method is given.')
  })
})

describe('the drive’s own parameters', () => {
  const dictionary = { 'K-1': { carry: 'teach' }, 'K-2': { carry: 'prove' }, 'K-3': { carry: 'place' }, 'K-4': { carry: 'copy' }, 'K-5': { unit: 'ms' } } as const
  const extra = { 'K-1': 1, 'K-2': 2, 'K-3': 3, 'K-4': 4, 'K-5': 5, 'constructor': 6 }
  const carries = (more: Partial<CarryCase>) => Object.fromEntries(carriedValues(linear({}, [], { extra }), swap({ out: { model: 'A', nameplate: plate({ dictionary }) }, ...more })).map(({ field = '', carry, why }) => [field, [carry, why]]))

  it('go as the dictionary of the model that they were read from has it; what is not in there is copied', () => {
    expect(Object.entries(carries({})).map(([key, [carry]]) => `${key} ${carry}`)).toEqual(['K-1 teach', 'K-2 prove', 'K-3 place', 'K-4 copy', 'K-5 copy', 'constructor copy'])
    // The new unit's dictionary says nothing about values of another model.
    expect(carries({ out: { model: 'A' }, into: { model: 'B', nameplate: plate({ dictionary }) } })['K-1']).toEqual(['copy', 'It belongs to the job.'])
  })

  it('stay in the drive where only the actuator is replaced, save what is proved or taught', () => {
    const found = carries({ replaced: 'actuator' })
    expect([found['K-1']?.[0], found['K-2']?.[0], found['K-4'], found['K-5']?.[1]]).toEqual(['teach', 'prove', ['copy', 'It stays in the drive.'], 'It stays in the drive.'])
  })
})

describe('rows', () => {
  const of = (content: ReturnType<typeof linear>) => carriedValues(content, swap()).map(({ section, carry, why }) => [section, carry, why])
  it('zones and moves go as a whole, and only where there are any', () => {
    expect(of(linear())).toEqual([])
    expect(of(linear({}, [], { zones: [{ zone: 1, from: 0, to: 1 }] }))).toEqual([['zone', 'copy', 'Zones are copied as they are.']])
    expect(of(linear({}, [{ move: 1, kind: 'absolute', target: 0, speed: 0, acceleration: 0 }]))).toEqual([['move', 'copy', 'The move table is copied row by row, empty rows too.']])
  })
})
