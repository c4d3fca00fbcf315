import { describe, expect, it } from 'vitest'
import { rules } from '../../../../shared/checks/table'
import type { JudgeInput } from '../../../../shared/checks/types'
import { absolute, linear, press, relative, soundSetup, unused } from '../../../support/check-input'
import { holdsCases, reachesItsLevels, type Case, type Change } from '../../../support/rule-cases'

/*
 * The second half of the rules by the numbers, on the same sound axis: windows, chains, inputs, zones, homing, brake, unit,
 * and what a site asks. Numbers are worked by hand beside the case.
 */

const scan = (controllerScan: number): Partial<JudgeInput> => ({ axis: { axisKind: 'linear', flags: [], controllerScan } })
const zones = (...stretches: readonly (readonly [from: number, to: number])[]): Change['content'] => ({ zones: stretches.map(([from, to], index) => ({ zone: index + 1, from, to })) })
/** Hard stops 10 mm beyond the soft limits, so that only the lag counts. */
const roomy = { plate: { hardMargin: 10 }, lagging: { homeOffset: 10, velocityFeedForward: 0 } }
/** Upright with 4 kg on 1 kg: 49.03325 N pull it down. */
const upright = { mountingAngle: 90, frictionForce: 0, brakeFitted: true, brakeEngageDelay: 40 }
const brake = { brakeFitted: true, brakeHolding: 300 }
const before = (positiveDirection: 'extend' | 'retract', target: number) => ({ before: { content: linear({ ...soundSetup, positiveDirection }, [absolute(1, target)]) } })
const site = (rule: Partial<JudgeInput['rules'][number]>): Partial<JudgeInput> => ({ rules: [{ id: 1, scope: 'site', field: 'jogSpeed', reason: 'guard', ...rule }] })
const known = (firmware: string, content = linear()): Partial<JudgeInput> => ({ unit: { model: 'HL40-200V', firmware: '2.4' }, knownGood: { firmware, content } })
const dictionary = { 'K-1': { min: 10, max: 20 }, 'K-2': { allowed: ['A', 'B'] }, 'K-3': { unit: 'ms', max: 5 } } as const
const own = (extra: Record<string, number | string | { value: number, unit: string }>): Change => ({ content: { extra }, plate: { dictionary: { 'K-1': dictionary['K-1'], 'K-2': { allowed: ['A', 'B'] }, 'K-3': dictionary['K-3'] } } })

const cases: Readonly<Record<string, readonly Case[]>> = {
  'following-window': [
    ['0.8 mm, wider than the 0.05 mm of the in-position window', {}, []],
    ['just as wide', { setup: { followingErrorWindow: 0.05 } }, ['warn']],
    // Without feed-forward the axis lags 250/50 = 5 mm; with 90 % of it half a millimetre.
    ['5.001 mm against a lag of 5 mm', { setup: { ...roomy.lagging, followingErrorWindow: 5.001 }, plate: roomy.plate }, []],
    ['5 mm against a lag of 5 mm', { setup: { ...roomy.lagging, followingErrorWindow: 5 }, plate: roomy.plate }, ['warn']],
    ['0.5 mm against a lag of 0.5 mm', { setup: { velocityFeedForward: 90, followingErrorWindow: 0.5 } }, ['warn']],
    // From 0 mm to the hard stop at −1 mm.
    ['as wide as the room to the hard stop', { setup: { followingErrorWindow: 1 } }, []],
    ['wider than that', { setup: { followingErrorWindow: 1.001 } }, ['note']],
    ['without a gain', { setup: { positionGain: undefined } }, ['unknown']],
    ['without a window', { setup: { followingErrorWindow: undefined } }, ['unknown']],
  ],
  'window-grid': [
    ['0.02 mm, to which the unit repeats', { setup: { inPositionWindow: 0.02 } }, []],
    ['finer than that', { setup: { inPositionWindow: 0.0199 } }, ['warn']],
    ['two counts of 0.02 mm', { setup: { inPositionWindow: 0.04 }, plate: { resolution: 0.02 } }, []],
    ['less than two counts', { setup: { inPositionWindow: 0.0399 }, plate: { resolution: 0.02 } }, ['warn']],
    ['a move’s own, a press left out', { moves: [absolute(1, 9, { window: 0.01 }), press(2, 9, 12, { window: 0.01 })] }, ['warn']],
    ['without repeatability', { plate: { repeatability: undefined } }, ['unknown']],
  ],
  'target-grid': [
    // Counts of 0.1 mm; half the window of 0.05 mm are 0.025 mm, the unit repeats to 0.02 mm.
    ['0.02 mm off', { plate: { resolution: 0.1 }, moves: [absolute(1, 10.02), absolute(2, 9.98)] }, []],
    ['0.021 mm off, one line for all', { plate: { resolution: 0.1 }, moves: [absolute(1, 10.021), absolute(2, 9.979)] }, ['note']],
    ['half a window of 0.03 mm is 0.015 mm', { plate: { resolution: 0.1 }, moves: [absolute(1, 10.015, { window: 0.03 }), absolute(2, 10.016, { window: 0.03 })] }, ['note']],
    ['without a count', { plate: { resolution: undefined } }, ['unknown']],
  ],
  'chain-target': [
    ['a row that is there', { moves: [absolute(1, 0, { next: 2 }), absolute(2, 9)] }, []],
    ['none', { moves: [absolute(1, 0, { next: 3 }), absolute(2, 9)] }, ['stop']],
    ['an empty one', { moves: [absolute(1, 0, { next: 2 }), unused(2)] }, ['stop']],
    ['no chain', {}, 'not applicable'],
  ],
  'chain-endless': [
    ['one that ends', { moves: [absolute(1, 0, { next: 2 }), absolute(2, 9)] }, []],
    ['one that does not', { moves: [absolute(1, 0, { next: 2 }), absolute(2, 9, { next: 1 })] }, ['note']],
    ['one whose lap takes no time', { moves: [absolute(1, 9, { next: 2 }), absolute(2, 9, { next: 1 })] }, ['warn']],
    ['one that waits a millisecond', { moves: [absolute(1, 9, { next: 2, dwell: 1 }), absolute(2, 9, { next: 1 })] }, ['note']],
  ],
  'chain-after-press': [
    ['a press that nothing follows', { moves: [press(1, 9, 12), absolute(2, 0)] }, 'not applicable'],
    ['a press whose follower is not there', { moves: [press(1, 9, 12, { next: 5 })] }, []],
    ['one that a move follows', { moves: [press(1, 9, 12, { next: 2 }), absolute(2, 0)] }, ['note']],
    ['no press', {}, 'not applicable'],
  ],
  'select-reach': [
    // Three inputs call 2³ = 8 codes, 0 to 7.
    ['move 7', { moves: [absolute(7, 9)] }, []],
    ['move 8', { moves: [absolute(8, 9)] }, ['warn']],
    ['move 8 where the first is 1', { moves: [absolute(8, 9)], plate: { firstMove: 1 } }, []],
    ['move 7 where all inputs off call nothing', { moves: [absolute(7, 9)], plate: { allOff: 'none' } }, ['warn']],
    ['move 8, which only follows', { moves: [absolute(1, 0, { next: 8 }), absolute(8, 9)] }, []],
    ['called over the bus', { setup: { selectInputs: 0 }, moves: [absolute(900, 9)] }, 'not applicable'],
  ],
  'start-timing': [
    // The input filter takes 2 ms; below 4 ms is too short in practice (common practice, no source).
    ['4 ms', { setup: { selectSettleTime: 4, startPulseTime: 4 } }, []],
    ['3.9 ms each', { setup: { selectSettleTime: 3.9, startPulseTime: 3.9 } }, ['warn', 'warn']],
    ['12 ms with a scan of 10 ms', { setup: { selectSettleTime: 12, startPulseTime: 12 }, input: scan(10) }, []],
    ['11.9 ms with a scan of 10 ms', { setup: { selectSettleTime: 12, startPulseTime: 11.9 }, input: scan(10) }, ['warn']],
    ['without a filter time', { plate: { inputFilterTime: undefined } }, ['unknown']],
  ],
  'zone-reach': [
    ['from limit to limit', { content: zones([0, 198]) }, []],
    ['beginning at the upper limit', { content: zones([198, 205]) }, ['note']],
    ['beginning a millionth beyond it', { content: zones([198.000001, 205]) }, ['warn']],
    ['two that touch', { content: zones([10, 20], [20, 30]) }, []],
    ['two that overlap', { content: zones([10, 20], [19.9, 30]) }, ['note']],
    // 250 mm/s · 8 ms = 2 mm.
    ['2 mm wide at a scan of 8 ms', { content: zones([10, 12]), input: scan(8) }, []],
    ['1.9 mm wide at a scan of 8 ms', { content: zones([10, 11.9]), input: scan(8) }, ['note']],
    ['without limits', { setup: { softLimitMin: undefined, softLimitMax: undefined }, content: zones([10, 20]) }, ['unknown']],
  ],
  'homing-plausible': [
    // 6 N of friction are 2 % of 300 N; homing needs no more.
    ['2 % against 6 N', { setup: { homingForceLimit: 2, frictionForce: 6 } }, []],
    ['1.999 %', { setup: { homingForceLimit: 1.999, frictionForce: 6 } }, ['stop']],
    ['against a hard stop without a limit', { setup: { homingForceLimit: undefined } }, ['stop']],
    ['creeping as fast as it searches', { setup: { homingCreepSpeed: 20 } }, []],
    ['creeping faster', { setup: { homingCreepSpeed: 20.1 } }, ['warn']],
    ['home where it stands', { setup: { homingMethod: 'current-position', homingForceLimit: undefined } }, ['warn']],
    // ½ · 5 kg · (0.02 m/s)² = 0.001 J.
    ['a blow of 0.001 J', { plate: { rotorInertia: undefined, maxImpactEnergy: 0.001 } }, []],
    ['and less allowed', { plate: { rotorInertia: undefined, maxImpactEnergy: 0.000999 } }, ['warn']],
    ['without a payload', { setup: { payloadMass: undefined } }, ['unknown', 'unknown']],
  ],
  'home-side': [
    ['home at −1 mm, beyond the lower limit', {}, []],
    ['home at the lower limit', { setup: { homeOffset: 0 } }, []],
    ['a thousandth inside', { setup: { homeOffset: -0.001 } }, ['stop']],
    ['home at the upper limit, found upwards', { setup: { homingDirection: 'positive', homeOffset: -198 } }, []],
    ['a thousandth inside', { setup: { homingDirection: 'positive', homeOffset: -197.999 } }, ['stop']],
    ['without an offset', { setup: { homeOffset: undefined } }, ['unknown']],
  ],
  'brake-vertical': [
    // 1.5 · 49.03325 = 73.549875 N.
    ['73.55 N hold, closed before the drive lets go', { setup: upright, plate: { ...brake, brakeHolding: 73.55 } }, []],
    ['73.5 N hold', { setup: upright, plate: { ...brake, brakeHolding: 73.5 } }, ['warn']],
    ['the drive lets go a millisecond early', { setup: { ...upright, brakeEngageDelay: 39 }, plate: brake }, ['stop']],
    ['no brake, and the enable releases', { setup: { ...upright, brakeFitted: false, onEnableLoss: 'release' } }, ['stop']],
    ['no brake, and it stops and holds', { setup: { ...upright, brakeFitted: false } }, []],
    // sin 5° of 49.03325 N are 4.27 N; friction of 5 N holds it.
    ['at 5° with friction', { setup: { ...upright, mountingAngle: 5, frictionForce: 5, brakeFitted: false, onEnableLoss: 'release' } }, []],
    ['at 5° with friction that nobody measured', { setup: { ...upright, mountingAngle: 5, frictionForce: undefined, brakeFitted: false, onEnableLoss: 'release' } }, ['stop']],
    ['without the delay', { setup: { ...upright, brakeEngageDelay: undefined }, plate: brake }, ['unknown']],
    ['level', {}, 'not applicable'],
  ],
  'brake-agrees': [
    ['none on either', {}, []],
    ['one in the drive alone', { setup: { brakeFitted: true } }, ['stop']],
    ['one on the unit alone', { plate: { brakeFitted: true } }, ['stop']],
    ['a nameplate that does not say', { plate: { brakeFitted: undefined } }, ['unknown']],
  ],
  'polarity-flip': [
    ['the same way as before', { input: before('extend', 100) }, []],
    ['turned, with its target and its limits', { setup: { softLimitMin: -198, softLimitMax: 0, positiveDirection: 'retract' }, moves: [absolute(1, -100)], input: before('extend', 100) }, []],
    ['turned, its target left', { setup: { positiveDirection: 'retract' }, input: before('extend', 100) }, ['stop']],
    ['no longer said', { setup: { positiveDirection: undefined }, input: before('extend', 100) }, ['unknown']],
    ['the first version', {}, 'not applicable'],
  ],
  'twin-moves': [
    ['two that differ by a millionth', { moves: [absolute(1, 9), absolute(2, 9.000001)] }, []],
    ['two that do the same', { moves: [absolute(1, 9), absolute(2, 9, { deceleration: 2000, label: 'again' })] }, ['note']],
    ['two empty ones', { moves: [unused(1), unused(2)] }, 'not applicable'],
  ],
  'unused-rows': [
    ['none', {}, []],
    ['one line for all', { moves: [unused(1), absolute(2, 9), unused(3)] }, ['note']],
  ],
  'unit-matches': [
    ['as registered', {}, []],
    ['another model', { input: { registered: { model: 'HL60-300' } } }, ['stop']],
    ['another of the stem', { input: { registered: { model: 'HL40-300V' } } }, ['warn']],
    ['another kind of axis', { input: { axis: { axisKind: 'rotary', flags: [] } } }, ['stop']],
    ['the known-good’s firmware', { input: known('2.4') }, []],
    ['another firmware', { input: known('2.3') }, ['warn']],
    ['an older one that lacks a key', { input: known('2.5', linear({ ...soundSetup, jogSpeed: 20 })) }, ['warn', 'stop']],
    ['not registered', { input: { registered: undefined } as Partial<JudgeInput> }, ['unknown']],
  ],
  'force-rescale': [
    ['percentages of the same 300 N', { input: { broughtFrom: { forceBase: 300, rescaled: false } } }, []],
    ['of 300.1 N', { input: { broughtFrom: { forceBase: 300.1, rescaled: false } } }, ['stop']],
    ['of no known force', { input: { broughtFrom: { rescaled: false } } }, ['unknown']],
    ['said to be right', { input: { broughtFrom: { forceBase: 400, rescaled: true } } }, 'not applicable'],
    ['read from this unit', {}, 'not applicable'],
  ],
  'site-rule': [
    ['50 of 50 mm/s', { setup: { jogSpeed: 50 }, input: site({ max: 50 }) }, []],
    ['50.1 of 50 mm/s', { setup: { jogSpeed: 50.1 }, input: site({ max: 50 }) }, ['stop']],
    ['not below 10 mm/s', { setup: { jogSpeed: 9.9 }, input: site({ min: 10 }) }, ['stop']],
    ['another value than the fixed one', { setup: { jogSpeed: 51 }, input: site({ fixed: 50 }) }, ['stop']],
    ['for each row that breaks it', { moves: [absolute(1, 9, { speed: 101 }), absolute(2, 9, { speed: 100 }), relative(3, 9, { speed: 102 })], input: site({ field: 'move.speed', max: 100 }) }, ['stop', 'stop']],
    ['about a field that nobody knows', { input: site({ field: 'jogSpeeed', max: 50 }) }, ['unknown']],
    ['no rule', {}, 'not applicable'],
  ],
  'extra-range': [
    ['10 and 20 of 10 to 20', own({ 'K-1': 20, 'K-2': 'A', 'K-3': { value: 5, unit: 'ms' } }), []],
    ['9.9', own({ 'K-1': 9.9 }), ['stop']],
    ['20.1', own({ 'K-1': 20.1 }), ['stop']],
    ['a word that is not allowed', own({ 'K-2': 'C' }), ['stop']],
    ['in another unit', own({ 'K-3': { value: 5, unit: 's' } }), ['unknown']],
    ['a text where a number belongs', own({ 'K-1': 'fast' }), ['stop']],
    ['without a nameplate', { content: { extra: { 'K-1': 1 } }, plate: null }, ['unknown']],
  ],
}

describe.each(Object.entries(cases))('%s', holdsCases)

describe('the rules above', () => {
  it('are the rest of the table, in its order', () => expect(Object.keys(cases)).toEqual(rules.slice(20).map(({ id }) => id)))
  it('reach each level that they have, and pass', () => reachesItsLevels(cases))
})
