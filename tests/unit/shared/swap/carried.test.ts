import { describe, expect, it } from 'vitest'
import type { Content, Setup } from '../../../../shared/settings/types'
import { carriedValues, type CarryCase } from '../../../../shared/swap/carried'
import { kitOf } from '../../../../shared/swap/kit'
import type { Nameplate } from '../../../../shared/settings/nameplate'

const plate: Nameplate = { model: 'A', axisKind: 'linear', stroke: 200, dictionary: { 'K-1': { carry: 'teach' }, 'K-2': { carry: 'prove' } } }
const like: CarryCase = { replaced: 'unit', out: { model: 'A', firmware: '1', nameplate: plate }, into: { model: 'A', firmware: '1', nameplate: plate }, ownValues: false }
const content = (setup: Setup): Content => ({ axisKind: 'linear', extra: { 'K-1': 5, 'K-2': 6, 'K-3': 7 }, moves: [], setup, zones: [] })
const all: Setup = { softLimitMax: 180, homeOffset: 12, homingMethod: 'hard-stop', thrustLimit: 38, frictionForce: 20, positionGain: 40, nodeAddress: 7, brakeEngageDelay: 60 }
const carries = (swap: CarryCase, setup = all) => Object.fromEntries(carriedValues(content(setup), swap).map(({ field = '', carry }) => [field, carry]))
const method = (homingMethod: NonNullable<Setup['homingMethod']>, replaced: CarryCase['replaced']) => carries({ ...like, replaced }, { homingMethod, homeOffset: 3 }).homeOffset

describe('what becomes of a value', () => {
  it('of the whole unit, by its carry class, and extra by the dictionary', () => {
    expect(carries(like)).toEqual({ 'softLimitMax': 'place', 'homeOffset': 'prove', 'homingMethod': 'copy', 'thrustLimit': 'copy', 'frictionForce': 'prove', 'positionGain': 'prove', 'nodeAddress': 'place', 'brakeEngageDelay': 'copy', 'K-1': 'teach', 'K-2': 'prove', 'K-3': 'copy' })
  })

  it('tuning is taught anew on another model or firmware, or where the firmware is not known', () => {
    expect(carries({ ...like, into: { ...like.into, firmware: '2' } }).positionGain).toBe('teach')
    expect(carries({ ...like, into: { ...like.into, model: 'B' } }).positionGain).toBe('teach')
    expect(carries({ ...like, into: { model: 'A' } }).positionGain).toBe('teach')
  })

  it('where only the drive is changed, friction stays and an encoder’s home is proved', () => {
    expect(carries({ ...like, replaced: 'drive' }).frictionForce).toBe('copy')
    expect([method('absolute-encoder', 'unit'), method('absolute-encoder', 'drive'), method('absolute-encoder', 'actuator')]).toEqual(['teach', 'prove', 'teach'])
    expect([method('hard-stop', 'unit'), method('current-position', 'drive')]).toEqual(['prove', 'teach'])
  })

  it('where only the actuator is changed, the drive keeps the rest and tuning goes by the model of the actuator', () => {
    const swap: CarryCase = { ...like, replaced: 'actuator', out: { ...like.out, actuatorModel: 'HA' }, into: { ...like.into, firmware: '9', actuatorModel: 'HA' } }
    expect(carries(swap)).toMatchObject({ positionGain: 'prove', frictionForce: 'prove', thrustLimit: 'copy', nodeAddress: 'place' })
    expect(carries({ ...swap, into: { ...swap.into, actuatorModel: 'HB' } }).positionGain).toBe('teach')
    expect(carriedValues(content(all), swap).find(({ field }) => field === 'brakeEngageDelay')?.why).toContain('judged against the brake of the new actuator')
  })

  it('is said in one sentence each', () => {
    for (const replaced of ['unit', 'drive', 'actuator'] as const) for (const { why } of carriedValues(content(all), { ...like, replaced })) expect(why).toMatch(/^[A-Z].+\.$/)
  })

  it('a unit’s own values go back as they are', () => {
    expect(new Set(Object.values(carries({ ...like, ownValues: true, into: { model: 'A', firmware: '3' } })))).toEqual(new Set(['copy']))
  })
})

describe('the kit', () => {
  it('leaves out what is taught, and names what is taught and proved', () => {
    const kit = kitOf(content({ ...all, homingMethod: 'index-pulse' }), like)
    expect(kit).toMatchObject({ teach: ['homeOffset', 'extra:K-1'], prove: ['frictionForce', 'positionGain', 'extra:K-2'], taughtSetup: ['homeOffset'], taughtExtra: ['K-1'], adjustments: [] })
    expect(kit.content.setup).not.toHaveProperty('homeOffset')
    expect(kit.content.extra).toEqual({ 'K-2': 6, 'K-3': 7 })
  })

  it('turns the sign of a home offset for a drive that counts the other way, and says so', () => {
    const other: CarryCase = { ...like, into: { model: 'B', nameplate: { ...plate, model: 'B', homeOffsetSense: 'home-reads-offset' } } }
    const kit = kitOf(content(all), other)
    expect(kit.content.setup.homeOffset).toBe(-12)
    expect(kit.adjustments).toMatchObject([{ at: '/setup/homeOffset', before: 12, after: -12, unit: 'mm', newtonsBefore: null, newtonsAfter: null }])
    expect(kitOf(content({ ...all, homingMethod: 'index-pulse' }), other).adjustments).toEqual([])
  })
})
