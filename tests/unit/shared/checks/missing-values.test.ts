import { describe, expect, it } from 'vitest'
import { judge } from '../../../../shared/checks/judge'
import type { CheckResult, JudgeInput } from '../../../../shared/checks/types'
import type { Nameplate } from '../../../../shared/settings/nameplate'
import type { Setup } from '../../../../shared/settings/types'
import { absolute, judgeInput, linear, press, relative, rotary, soundPlate, soundSetup } from '../../../support/check-input'

/*
 * What a rule does without a value, each value taken away from an axis of which all is known: which rules then say that they
 * cannot judge, and which go on with what counts in its stead. Written down by hand a second time, because an unknown of a
 * stop rule holds a version up, and a stop rule that silently goes on lets one pass.
 */

// A slide at 30 deg with a brake: it has something for every rule to look at.
const setup: Setup = {
  ...soundSetup, jogSpeed: 20, overloadLevel: 75, overloadTime: 900, mountingAngle: 30, brakeFitted: true, brakeEngageDelay: 60, homingAcceleration: 1000,
}
const nameplate: Nameplate = { ...soundPlate, brakeFitted: true, dictionary: { 'K-017': { min: 0, max: 31 } } }
const moves = [
  absolute(0, 20, { next: 1, window: 0.05 }), press(1, 100, 110), relative(2, 60), absolute(3, 0, { next: 4, dwell: 500 }), absolute(4, 150, { next: 3, dwell: 500 }),
]
const rest = { zones: [{ zone: 1, from: 10, to: 25 }], extra: { 'K-017': 15 } }

function slide(own: Setup, plate: Nameplate | undefined, more: Partial<JudgeInput> = {}): JudgeInput {
  const content = linear(own, moves, rest)
  return judgeInput(content, {
    ...plate ? { nameplate: plate } : {}, unit: { model: 'HL40-200V', firmware: '2.4' }, knownGood: { firmware: '2.4', content }, before: { content: linear(setup, moves, rest) },
    broughtFrom: { forceBase: 300, rescaled: false }, rules: [{ id: 1, scope: 'site', field: 'jogSpeed', max: 50, reason: 'guard' }], ...more,
  })
}

const results = (input: JudgeInput): readonly CheckResult[] => judge(input).results
/** The rules that cannot judge, each once, with what they name as missing. */
const asking = (input: JudgeInput) => [...new Set(results(input).filter(({ level }) => level === 'unknown').map(({ rule, missing = [] }) => `${rule} ${missing.join(' ')}`))]
/** What is told besides, and was not told before. */
const told = (input: JudgeInput) => {
  const known = new Set(results(slide(setup, nameplate)).map(({ level, rule }) => `${level} ${rule}`))
  return results(input).filter(({ level }) => level !== 'unknown').map(({ level, rule }) => `${level} ${rule}`).filter(line => !known.has(line))
}
const without = <Values extends object>(values: Values, ...keys: readonly string[]) => Object.fromEntries(Object.entries(values).filter(([key]) => !keys.includes(key))) as Values

describe('an axis of which all is known', () => {
  it('is judged by every rule that applies, and none asks for anything', () => {
    expect(asking(slide(setup, nameplate))).toEqual([])
    expect(results(slide(setup, nameplate)).filter(({ level }) => level === 'stop' || level === 'warn')).toEqual([])
  })
})

/* A value of the setup that is asked for: by whom. A rule in two columns of the page stands here once. */
const askedOfSetup: Readonly<Record<string, readonly string[]>> = {
  softLimitMin: ['travel-span', 'travel-placed', 'target-inside', 'relative-step', 'press-path', 'zone-reach', 'home-side'],
  softLimitMax: ['travel-span', 'travel-placed', 'target-inside', 'relative-step', 'press-path', 'zone-reach'],
  positiveDirection: ['polarity-flip'],
  homingMethod: ['travel-placed', 'homing-plausible', 'home-side'],
  homingDirection: ['travel-placed', 'home-side'],
  homeOffset: ['travel-placed', 'home-side'],
  homingSpeed: ['homing-plausible'],
  quickStopDeceleration: ['quick-stop-soft', 'stopping-room'],
  inPositionWindow: ['following-window'],
  followingErrorWindow: ['following-window'],
  positionGain: ['following-window'],
  thrustLimit: ['press-force'],
  payloadMass: ['press-arrives', 'press-speed', 'thrust-needed', 'thrust-rms', 'payload', 'stopping-room', 'homing-plausible', 'brake-vertical'],
  mountingAngle: ['press-arrives', 'thrust-needed', 'thrust-rms', 'stopping-room', 'homing-plausible', 'brake-vertical'],
  selectSettleTime: ['start-timing'],
  startPulseTime: ['start-timing'],
  brakeFitted: ['brake-agrees'],
  brakeEngageDelay: ['brake-vertical'],
  overloadLevel: ['press-hold'],
  jogSpeed: ['site-rule'],
}

describe('without a value of the setup', () => {
  it.each(Object.entries(askedOfSetup))('%s: %j ask for it', (field, rules) => {
    expect(asking(slide(without(setup, field), nameplate))).toEqual(rules.map(rule => `${rule} ${field}`))
  })

  /* What counts in its stead, and what that brings: nothing where the axis is as well off with it. */
  it.each([
    ['homingForceLimit', 'a hard stop found with all the thrust there is', ['stop homing-plausible']],
    ['velocityFeedForward', '0: the axis lags 250/50 = 5 mm, beyond a window of 0.8 mm', ['warn following-window']],
    ['frictionForce', '0, and the sentence says so', []],
    ['homingCreepSpeed', 'no second speed', []],
    ['homingAcceleration', 'none to judge', []],
    ['speedLimit', 'the unit alone limits', []],
    ['selectInputs', 'moves are called over the bus', []],
    ['overloadTime', 'no time to outlast: below the level it does not matter', []],
    ['onEnableLoss', 'a brake is there that holds the load', []],
  ])('%s counts as %s', (field, _what, lines) => {
    const input = slide(without(setup, field), nameplate)
    expect(asking(input)).toEqual([])
    expect(told(input)).toEqual(lines)
  })

  it('every value of this axis is in one of the two lists, so that none is forgotten', () => {
    const counted = ['homingForceLimit', 'velocityFeedForward', 'frictionForce', 'homingCreepSpeed', 'homingAcceleration', 'speedLimit', 'selectInputs', 'overloadTime', 'onEnableLoss']
    expect([...Object.keys(askedOfSetup), ...counted].sort()).toEqual(Object.keys(setup).sort())
  })

  it('two at once are asked for together, in one sentence a rule', () => {
    expect(asking(slide(without(setup, 'softLimitMin', 'softLimitMax'), nameplate))).toContain('travel-span softLimitMin softLimitMax')
    expect(asking(slide(without(setup, 'payloadMass', 'mountingAngle'), nameplate))).toContain('thrust-needed payloadMass mountingAngle')
    expect(asking(slide(without(setup, 'selectSettleTime', 'startPulseTime'), nameplate))).toContain('start-timing selectSettleTime startPulseTime')
  })
})

const askedOfPlate: Readonly<Record<string, readonly string[]>> = {
  maxSpeed: ['speed-limit'],
  maxAcceleration: ['acceleration-limit'],
  pressForceMin: ['press-force'],
  pressForceMax: ['press-force'],
  maxPressSpeed: ['press-speed'],
  ratedThrust: ['press-arrives', 'thrust-needed', 'thrust-rms', 'stopping-room', 'homing-plausible', 'force-rescale'],
  resolution: ['window-grid', 'target-grid'],
  repeatability: ['window-grid', 'target-grid'],
  inputFilterTime: ['start-timing'],
  maxPayloadLevel: ['payload'],
  maxPayloadVertical: ['payload'],
  maxOverloadTime: ['overload-plausible'],
  brakeFitted: ['brake-agrees'],
  brakeCloseTime: ['brake-vertical'],
  brakeHolding: ['brake-vertical'],
}

describe('without a value of the nameplate', () => {
  it.each(Object.entries(askedOfPlate))('%s: %j ask for it', (field, rules) => {
    expect(asking(slide(setup, without(nameplate, field)))).toEqual(rules.map(rule => `${rule} nameplate.${field}`))
  })

  it.each([
    ['hardMargin', '0: the lower hard stop at −1 mm, the soft limit inside it', []],
    ['maxImpactEnergy', 'no limit of the unit', []],
    ['peakThrust', 'no limit of its own', []],
    ['movingMass', '0, and the sentence says so', []],
    ['rotorInertia', '0, and the sentence says so', []],
    ['lead', 'turning parts that weigh nothing', []],
    ['maxPayloadInertia', 'nothing on a linear axis', []],
    ['dictionary', 'no bounds of the drive’s own values', []],
  ])('%s counts as %s', (field, _what, lines) => {
    const input = slide(setup, without(nameplate, field))
    expect(asking(input)).toEqual([])
    expect(told(input)).toEqual(lines)
  })

  it('the whole of it: every rule that needs some of it says so, and no other falls silent', () => {
    const lines = asking(slide(setup, undefined))
    const rules = lines.map(line => line.split(' ')[0])
    expect(rules).toEqual(expect.arrayContaining(['travel-span', 'travel-placed', ...Object.values(askedOfPlate).flat(), 'extra-range']))
    for (const line of lines) for (const name of line.split(' ').slice(1)) expect(name, line).toMatch(/^nameplate\.\w+$/)
  })
})

describe('without what else is known of the axis', () => {
  it('the register: unit-matches asks for the model', () => {
    const { registered: _registered, ...input } = slide(setup, nameplate)
    expect(asking(input)).toEqual(['unit-matches registered.model'])
  })

  it('the firmware of the file: unit-matches asks for it where the known-good has one', () => {
    expect(asking(slide(setup, nameplate, { unit: { model: 'HL40-200V' } }))).toEqual(['unit-matches unit.firmware'])
  })

  it('the force base of the unit that the values come from: force-rescale asks for it', () => {
    expect(asking(slide(setup, nameplate, { broughtFrom: { rescaled: false } }))).toEqual(['force-rescale force base of the unit before'])
  })

  it('the start of a press: press-path asks for it', () => {
    const content = linear(setup, moves.map(({ next: _next, ...move }) => move), rest)
    expect(asking({ ...slide(setup, nameplate), content })).toEqual(['press-path start of press'])
  })

  it('a version before, a known-good, rules and flags: nobody asks, there is nothing to hold it against', () => {
    const { before: _before, knownGood: _good, broughtFrom: _brought, ...input } = slide(setup, nameplate, { rules: [] })
    expect(asking(input)).toEqual([])
    expect(told(input)).toEqual([])
  })
})

/* A table that turns: inertia in the place of mass, and no angle that has to be known. */
describe('without a value of a rotary axis', () => {
  const { payloadMass: _mass, frictionForce: _force, mountingAngle: _angle, ...linearSetup } = setup
  const turning: Setup = { ...linearSetup, positiveDirection: 'clockwise', payloadInertia: 40, frictionTorque: 0.2, mountingAngle: 0, unbalanceTorque: 0 }
  const plate: Nameplate = { ...nameplate, axisKind: 'rotary', rotorInertia: 0 }
  const table = (own: Setup, of: Nameplate = plate) => {
    const content = rotary(own, moves, rest)
    return { ...slide(setup, of), content, axis: { axisKind: 'rotary', flags: [] } as const, before: { content: rotary(turning, moves, rest) }, knownGood: { firmware: '2.4', content } }
  }

  it('payloadInertia is asked for where payloadMass would be', () => {
    expect(asking(table(turning))).toEqual([])
    expect(asking(table(without(turning, 'payloadInertia'))).map(line => line.split(' ')[0]))
      .toEqual(['press-arrives', 'press-speed', 'thrust-needed', 'thrust-rms', 'payload', 'stopping-room', 'homing-plausible'])
  })

  it('maxPayloadInertia is asked for where the maximum payloads would be', () => {
    expect(asking(table(turning, without(plate, 'maxPayloadInertia')))).toEqual(['payload nameplate.maxPayloadInertia'])
    expect(asking(table(turning, without(plate, 'maxPayloadLevel', 'maxPayloadVertical')))).toEqual([])
  })

  it('mountingAngle is not asked for where nothing is out of balance', () => {
    expect(asking(table(without(turning, 'mountingAngle')))).toEqual([])
  })
})
