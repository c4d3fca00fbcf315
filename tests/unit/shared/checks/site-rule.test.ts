import { describe, expect, it } from 'vitest'
import { siteRule } from '../../../../shared/checks/site-rule'
import type { SiteRule } from '../../../../shared/checks/types'
import { absolute, judgeInput, linear, press, rotary, told, unused } from '../../../support/check-input'

const reason = 'jars crack above 300 N'
const rule = (field: string, bounds: Partial<SiteRule>): SiteRule => ({ id: 7, scope: 'site', field, reason, ...bounds })
const content = linear({ thrustLimit: 55, brakeFitted: true, onEnableLoss: 'release', pressSpeed: 12 }, [
  absolute(1, 10, { speed: 300, forceLimit: 40 }), press(5, 100, 150, { speed: 500, forceLimit: 45, pressSpeed: undefined }), unused(9),
], { zones: [{ zone: 2, from: 10, to: 25 }], extra: { 'K-017': 15, 'Filter': 'B', 'Ramp': { value: 3, unit: 'counts' } } })
const asks = (field: string, bounds: Partial<SiteRule>) => told(siteRule, judgeInput(content, { rules: [rule(field, bounds)] }))

describe('site-rule', () => {
  it('says the reason: 55 % against at most 45 %', () => {
    expect(asks('thrustLimit', { max: 45 })).toEqual(['stop: Thrust limit 55 % is above the 45 % allowed on this site: jars crack above 300 N.'])
    expect(siteRule.judge(judgeInput(content, { rules: [rule('thrustLimit', { max: 45 })] }))).toMatchObject([{ at: ['/setup/thrustLimit'], values: { ruleId: 7, value: 55, max: 45 } }])
  })

  it('lets the bounds themselves pass', () => {
    expect(asks('thrustLimit', { max: 55, min: 55, fixed: 55 })).toEqual([])
    expect(asks('thrustLimit', { max: 54.999999 })).toHaveLength(1)
  })

  it('turns at its bounds: 55 % pass at most 55 and at least 55, and not a millionth beyond', () => {
    expect([asks('thrustLimit', { max: 55 }), asks('thrustLimit', { min: 55 }), asks('thrustLimit', { fixed: 55 })]).toEqual([[], [], []])
    expect([asks('thrustLimit', { max: 54.999999 }), asks('thrustLimit', { min: 55.000001 }), asks('thrustLimit', { fixed: 55.000001 })].map(lines => lines.length)).toEqual([1, 1, 1])
  })

  it('tells too little, and a value that is not the fixed one', () => {
    expect(asks('thrustLimit', { min: 60, scope: 'machine' })).toEqual(['stop: Thrust limit 55 % is below the 60 % asked on this machine: jars crack above 300 N.'])
    expect(asks('thrustLimit', { fixed: 50, scope: 'axis' })).toEqual(['stop: Thrust limit 55 % is not the 50 % set on this axis: jars crack above 300 N.'])
    expect(asks('brakeFitted', { fixed: false })).toEqual(['stop: Brake fitted on is not the off set on this site: jars crack above 300 N.'])
    expect(asks('onEnableLoss', { fixed: 'stop-and-hold' })).toEqual(['stop: On enable loss “release” is not the “stop-and-hold” set on this site: jars crack above 300 N.'])
    expect(asks('onEnableLoss', { fixed: 'release' })).toEqual([])
  })

  it('looks at every move in use', () => {
    expect(asks('move.speed', { max: 400 })).toEqual(['stop: Move 5 speed 500 mm/s is above the 400 mm/s allowed on this site: jars crack above 300 N.'])
    expect(asks('move.speed', { max: 100 })).toHaveLength(2)
    expect(siteRule.judge(judgeInput(content, { rules: [rule('move.forceLimit', { max: 42 })] }))).toMatchObject([{ at: ['/moves/1/forceLimit'], values: { move: 5, value: 45 } }])
    expect(asks('move.kind', { fixed: 'absolute' })).toEqual(['stop: Move 5 kind “press” is not the “absolute” set on this site: jars crack above 300 N.'])
  })

  it('goes by what the drive takes where a row leaves a field out', () => {
    // Move 1 and press 5 brake as they accelerate, with 2000 mm/s²; press 5 presses at the 12 mm/s of the setup.
    expect(asks('move.deceleration', { max: 1500 })).toHaveLength(2)
    expect(siteRule.judge(judgeInput(content, { rules: [rule('move.pressSpeed', { max: 10 })] }))).toMatchObject([{ at: ['/setup/pressSpeed'], values: { move: 5, value: 12, max: 10 } }])
    expect(asks('move.window', { min: 0.1 })).toEqual([])
  })

  it('looks at zones and at the drive’s own parameters, in its own unit', () => {
    expect(asks('zone.from', { min: 12 })).toEqual(['stop: Zone 2 from 10 mm is below the 12 mm asked on this site: jars crack above 300 N.'])
    expect(asks('zone.to', { max: 25 })).toEqual([])
    expect(asks('extra:K-017', { max: 14 })).toEqual(['stop: K-017 15 is above the 14 allowed on this site: jars crack above 300 N.'])
    expect(asks('extra:Ramp', { max: 2 })).toEqual(['stop: Ramp 3 counts is above the 2 counts allowed on this site: jars crack above 300 N.'])
    expect(asks('extra:Filter', { max: 2 })).toEqual(['stop: Filter “B” is no number, as it has to be on this site: jars crack above 300 N.'])
  })

  it('does not know where the value is not set or the field means nothing', () => {
    expect(asks('jogSpeed', { max: 50 })).toEqual(['unknown: A rule of this site cannot be judged without jogSpeed.'])
    expect(asks('extra:constructor', { max: 50 })).toEqual(['unknown: A rule of this site cannot be judged without extra:constructor.'])
    expect(asks('move.constructor', { max: 50 })).toEqual(['unknown: A rule of this site cannot be judged without move.constructor.'])
  })

  it('passes over a field of the other axis kind', () => {
    expect(asks('payloadInertia', { max: 5 })).toEqual([])
    expect(told(siteRule, judgeInput(rotary(), { rules: [rule('payloadInertia', { max: 5 })] }))[0]).toMatch(/^unknown/)
  })

  it('ends with one full stop and does not apply without rules', () => {
    expect(asks('thrustLimit', { max: 45, reason: 'Jars crack. ' })[0]).toMatch(/on this site: Jars crack\.$/)
    expect(told(siteRule, judgeInput(content))).toEqual(['not applicable'])
  })
})
