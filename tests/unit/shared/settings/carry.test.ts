import { describe, expect, it } from 'vitest'
import { type CarryContext, carryOf } from '../../../../shared/settings/carry'
import { setupFieldNames, setupFields } from '../../../../shared/settings/fields'

const context: CarryContext = { homingMethod: 'hard-stop', replaced: 'unit', sameModelAndFirmware: true }
const tuning = setupFieldNames.filter(name => setupFields[name].group === 'tuning')

describe('the home offset', () => {
  it.each([
    ['hard-stop', 'unit', 'prove'], ['hard-stop', 'drive', 'prove'], ['hard-stop', 'actuator', 'prove'],
    ['limit-switch', 'unit', 'prove'], ['limit-switch', 'actuator', 'prove'], ['home-switch', 'unit', 'prove'], ['home-switch', 'drive', 'prove'],
    ['index-pulse', 'unit', 'teach'], ['index-pulse', 'actuator', 'teach'], ['index-pulse', 'drive', 'prove'],
    ['absolute-encoder', 'unit', 'teach'], ['absolute-encoder', 'actuator', 'teach'], ['absolute-encoder', 'drive', 'prove'],
    ['current-position', 'unit', 'teach'], ['current-position', 'drive', 'teach'], ['current-position', 'actuator', 'teach'],
  ] as const)('found by %s, %s replaced: %s', (homingMethod, replaced, carry) => {
    expect(carryOf('homeOffset', { ...context, homingMethod, replaced })).toBe(carry)
    expect(carryOf('homeOffset', { ...context, homingMethod, replaced, sameModelAndFirmware: false })).toBe(carry)
  })

  it('is taught where the method is not known', () => {
    expect(carryOf('homeOffset', { replaced: 'drive', sameModelAndFirmware: true })).toBe('teach')
  })
})

describe('tuning', () => {
  it('is proved on the same model and firmware, else taught', () => {
    expect(tuning).toContain('velocityGain')
    for (const name of tuning) {
      expect(carryOf(name, context)).toBe('prove')
      expect(carryOf(name, { ...context, sameModelAndFirmware: false })).toBe('teach')
    }
  })
})

describe('all other fields', () => {
  it('go by the table, whatever was replaced', () => {
    for (const name of setupFieldNames.filter(each => each !== 'homeOffset' && !tuning.includes(each))) {
      for (const replaced of ['unit', 'drive', 'actuator'] as const) {
        expect(carryOf(name, { ...context, replaced, sameModelAndFirmware: false })).toBe(setupFields[name].carry)
      }
    }
  })

  it.each([['softLimitMax', 'place'], ['positiveDirection', 'place'], ['nodeAddress', 'place'], ['softLimitsActive', 'copy'], ['brakeReleaseDelay', 'copy'], ['frictionForce', 'prove']] as const)(
    '%s: %s', (name, carry) => expect(carryOf(name, context)).toBe(carry))
})
