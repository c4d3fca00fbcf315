import { describe, expect, it } from 'vitest'
import { changeOf } from '../../../../shared/diff/change'
import { extraRule, rulesFor } from '../../../../shared/diff/rules'
import { sidesOf } from '../../../../shared/diff/sides'
import { watching } from '../../../../shared/diff/watched'
import { extraWeight, moveWeight } from '../../../../shared/diff/weight'
import { emptyContent } from '../../../../shared/settings/content'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'
import { moveFieldNames, moveFields } from '../../../../shared/settings/move-fields'
import { axisFlags, weights } from '../../../../shared/settings/types'

describe('rules of a field', () => {
  it('hold what the table of setup fields says', () => {
    for (const name of setupFieldNames) {
      expect(rulesFor('linear', {}).setup(name)).toMatchObject({ field: name, weight: setupFields[name].weight, watched: setupFields[name].watched, added: false })
    }
  })

  it('watch every harm field and the four tuning fields, windows and times of settings-format', () => {
    const rules = rulesFor('linear', {})
    const watchedMotion = setupFieldNames.filter(name => rules.setup(name).watched && rules.setup(name).weight === 'motion')
    expect(watchedMotion).toEqual([
      'inPositionWindow', 'inPositionTime', 'positionGain', 'velocityGain', 'velocityIntegralTime', 'velocityFeedForward', 'inertiaRatio', 'notchFrequency',
    ])
    expect(setupFieldNames.filter(name => rules.setup(name).weight === 'harm' && !rules.setup(name).watched)).toEqual([])
    expect(setupFieldNames.filter(name => !rules.setup(name).watched)).toEqual(['homingAcceleration', 'jerk', 'smoothingTime', 'frictionForce', 'frictionTorque'])
  })

  it('take the unit of the axis kind, none for words and bare numbers', () => {
    expect(rulesFor('linear', {}).move.speed.unit).toBe('mm/s')
    expect(rulesFor('rotary', {}).move.speed.unit).toBe('deg/s')
    expect(rulesFor('linear', {}).setup('selectInputs').unit).toBeUndefined()
    expect(rulesFor('linear', {}).setup('payloadInertia').unit).toBeUndefined()
    expect(rulesFor('linear', {}).move.next.unit).toBeUndefined()
    expect(rulesFor('linear', {}).axisKind.unit).toBeUndefined()
  })

  it('of another axis kind stand beside each other', () => {
    const { was, is } = sidesOf(emptyContent('linear'), emptyContent('rotary'), {})
    expect([was.zone.from.unit, is.zone.from.unit]).toEqual(['mm', 'deg'])
    const alike = sidesOf(emptyContent('linear'), emptyContent('linear'), { flags: ['press'] })
    expect(alike.was).toBe(alike.is)
  })
})

describe('weights', () => {
  it('of motion fields of moves are harm with any flag, and of no other field', () => {
    for (const flag of axisFlags) {
      const { move, zone } = rulesFor('linear', { flags: [flag] })
      for (const name of moveFieldNames) expect(move[name].weight).toBe(moveFields[name].weight === 'text' ? 'text' : 'harm')
      expect(zone.from.weight).toBe('harm')
    }
    expect(weights.map(weight => moveWeight(weight, []))).toEqual(['harm', 'motion', 'text'])
    expect(weights.map(weight => moveWeight(weight, ['gravity']))).toEqual(['harm', 'harm', 'text'])
  })

  it('of the drive’s own keys are the dictionary’s, else motion', () => {
    expect(extraWeight(undefined)).toBe('motion')
    expect(extraWeight({ unit: 'A' })).toBe('motion')
    expect(weights.map(weight => extraWeight({ weight }))).toEqual(['harm', 'motion', 'text'])
    expect(extraRule('constructor', { dictionary: {} })).toMatchObject({ weight: 'motion', unit: undefined })
    expect(extraRule('K-1', { dictionary: { 'K-1': { weight: 'harm', unit: 'A' } } })).toMatchObject({ weight: 'harm', watched: true, unit: 'A' })
  })
})

describe('watching', () => {
  it('tells what is watched everywhere from what the site added', () => {
    const watch = watching({ watched: ['jerk', 'extra:K-1'] })
    expect(watch('jerk', false)).toEqual({ watched: true, added: true })
    expect(watch('thrustLimit', true)).toEqual({ watched: true, added: false })
    expect(watch('K-1', false)).toEqual({ watched: false, added: false })
    expect(watching({})('jerk', false)).toEqual({ watched: false, added: false })
  })

  it('of a default written out is what the site added', () => {
    const place = { at: '/moves/0/deceleration', section: 'move', row: 0 } as const
    const rule = (watched: readonly string[]) => rulesFor('linear', { watched }).move.deceleration
    expect(changeOf(rule([]), place, undefined, 2000, true)).toMatchObject({ weight: 'text', watched: false })
    expect(changeOf(rule(['deceleration']), place, undefined, 2000, true)).toMatchObject({ weight: 'text', watched: true })
    expect(changeOf(rule([]), place, undefined, 2000, false)).toMatchObject({ weight: 'motion', watched: true })
  })
})
