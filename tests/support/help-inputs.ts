import { accelerationLimit } from '../../shared/checks/acceleration-limit'
import { brakeAgrees } from '../../shared/checks/brake-agrees'
import { brakeVertical } from '../../shared/checks/brake-vertical'
import { chainAfterPress } from '../../shared/checks/chain-after-press'
import { chainEndless } from '../../shared/checks/chain-endless'
import { chainTarget } from '../../shared/checks/chain-target'
import { extraRange } from '../../shared/checks/extra-range'
import { followingWindow } from '../../shared/checks/following-window'
import { forceRescale } from '../../shared/checks/force-rescale'
import { homeSide } from '../../shared/checks/home-side'
import { homingPlausible } from '../../shared/checks/homing-plausible'
import { addressTwice } from '../../shared/checks/live/address-twice'
import { sisterOutlier } from '../../shared/checks/live/sister-outlier'
import { overloadPlausible } from '../../shared/checks/overload-plausible'
import { payload } from '../../shared/checks/payload'
import { polarityFlip } from '../../shared/checks/polarity-flip'
import { pressArrives } from '../../shared/checks/press-arrives'
import { pressForce } from '../../shared/checks/press-force'
import { pressHold } from '../../shared/checks/press-hold'
import { pressPath } from '../../shared/checks/press-path'
import { pressSpeed } from '../../shared/checks/press-speed'
import { quickStopSoft } from '../../shared/checks/quick-stop-soft'
import { relativeStep } from '../../shared/checks/relative-step'
import { selectReach } from '../../shared/checks/select-reach'
import { siteRule } from '../../shared/checks/site-rule'
import { softLimitsOff } from '../../shared/checks/soft-limits-off'
import { speedLimit } from '../../shared/checks/speed-limit'
import { speedReached } from '../../shared/checks/speed-reached'
import { startTiming } from '../../shared/checks/start-timing'
import { stoppingRoom } from '../../shared/checks/stopping-room'
import { targetGrid } from '../../shared/checks/target-grid'
import { targetInside } from '../../shared/checks/target-inside'
import { thrustLimit } from '../../shared/checks/thrust-limit'
import { thrustNeeded } from '../../shared/checks/thrust-needed'
import { thrustRms } from '../../shared/checks/thrust-rms'
import { travelPlaced } from '../../shared/checks/travel-placed'
import { travelSpan } from '../../shared/checks/travel-span'
import { twinMoves } from '../../shared/checks/twin-moves'
import type { CheckResult, JudgeInput, Rule } from '../../shared/checks/types'
import { unitMatches } from '../../shared/checks/unit-matches'
import { unusedRows } from '../../shared/checks/unused-rows'
import { windowGrid } from '../../shared/checks/window-grid'
import { zoneReach } from '../../shared/checks/zone-reach'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { Move, Setup } from '../../shared/settings/types'
import { absolute, judgeInput, limits, linear, plate, press, relative, unused } from './check-input'

/*
 * What the worked examples of the help page put in words, by rule, and what the rule says to it. Each shows only the values
 * that it is about; of several answers the first is told.
 */

interface Example { readonly input: unknown, readonly results: readonly CheckResult[] }

function by(rule: Rule, setup: Setup, moves: readonly Move[] = [], nameplate: Partial<Nameplate> = {}, rest: Partial<JudgeInput> = {}): [string, Example] {
  const { content, ...more } = judgeInput(linear(setup, moves), { nameplate: plate(nameplate), ...rest })
  const input = { content: rest.content ?? content, ...more }
  return [rule.id, { input, results: rule.judge(input) }]
}

const upright: Setup = { mountingAngle: 90, payloadMass: 8, frictionForce: 20, brakeFitted: true, brakeEngageDelay: 30, onEnableLoss: 'stop-and-release' }
const out = linear({ positiveDirection: 'extend' }, [absolute(1, 50)])
const bus = [{ tag: 'LID-01.Z', nodeAddress: 26 }, { tag: 'LID-02.Z', nodeAddress: 26 }]
const sisters = [38, 55, 38, 38, 38, 38].map((thrustLimit, index) => ({ tag: `LID-0${index + 1}.Z`, content: linear({ thrustLimit }), flags: [] }))
const siteRules = [{ id: 1, scope: 'machine', field: 'jogSpeed', max: 10, reason: 'people stand beside it' }] as const

const strong: Partial<Nameplate> = { ratedThrust: 300, movingMass: 1, rotorInertia: 0, lead: 10 }
const loaded: Setup = { payloadMass: 9, mountingAngle: 0, frictionForce: 0 }
const homed: Setup = { ...limits, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: 2 }

export const helpInputs: ReadonlyMap<string, Example> = new Map([
  by(travelSpan, { softLimitMin: 0, softLimitMax: 205 }, [], { stroke: 200 }),
  by(travelPlaced, { softLimitMin: 2, softLimitMax: 200, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: -3 }, [], { stroke: 200, hardMargin: 1 }),
  by(softLimitsOff, { softLimitsActive: false }, [], {}, { axis: { axisKind: 'linear', flags: ['gravity'] } }),
  by(targetInside, limits, [absolute(5, 212.4)]),
  by(relativeStep, limits, [relative(3, 150)]),
  by(pressPath, limits, [absolute(1, 120, { next: 2 }), press(2, 100, 150)]),
  by(pressForce, { thrustLimit: 80 }, [press(2, 100, 150, { forceLimit: 75 })], { pressForceMin: 20, pressForceMax: 70 }),
  by(pressSpeed, {}, [press(2, 100, 150, { pressSpeed: 25 })], { maxPressSpeed: 20 }),
  by(speedLimit, {}, [absolute(1, 50, { speed: 600 })], { maxSpeed: 500 }),
  by(accelerationLimit, {}, [absolute(1, 50, { acceleration: 6000, deceleration: 2000 })], { maxAcceleration: 5000 }),
  by(windowGrid, { inPositionWindow: 0.015 }, [], { resolution: 0.01, repeatability: 0.01 }),
  by(targetGrid, { inPositionWindow: 0.05 }, [absolute(1, 10.03)], { resolution: 0.1, repeatability: 0.1 }),
  by(chainTarget, {}, [absolute(3, 50, { next: 9 })]),
  by(chainEndless, {}, [absolute(1, 50, { next: 2 }), absolute(2, 0, { next: 1 })]),
  by(chainAfterPress, {}, [press(2, 100, 150, { next: 3 }), absolute(3, 10)]),
  by(selectReach, { selectInputs: 3 }, [absolute(1, 20), absolute(9, 50)]),
  by(startTiming, { selectSettleTime: 4.5, startPulseTime: 8 }, [], { inputFilterTime: 5 }),
  by(zoneReach, limits, [], {}, { content: linear(limits, [], { zones: [{ zone: 2, from: 200, to: 210 }] }) }),
  by(homeSide, { ...limits, homingMethod: 'hard-stop', homingDirection: 'negative', homeOffset: -5 }),
  by(brakeVertical, upright, [], { brakeFitted: true, brakeCloseTime: 40, brakeHolding: 300, movingMass: 2 }),
  by(brakeAgrees, { brakeFitted: true }, [], { brakeFitted: false }),
  by(polarityFlip, { positiveDirection: 'retract' }, [absolute(1, 50)], {}, { before: { content: out } }),
  by(twinMoves, {}, [absolute(1, 10), absolute(7, 10)]),
  by(unusedRows, {}, [absolute(0, 10), unused(4)]),
  by(unitMatches, {}, [], {}, { unit: { model: 'HL40-200V' }, registered: { model: 'HR16' } }),
  by(forceRescale, { thrustLimit: 38 }, [], { ratedThrust: 800 }, { broughtFrom: { forceBase: 640, rescaled: false } }),
  by(siteRule, { jogSpeed: 25 }, [], {}, { rules: siteRules }),
  by(extraRange, {}, [], { dictionary: { 'K-017': { min: 0, max: 31 } } }, { content: linear({}, [], { extra: { 'K-017': 40 } }) }),
  by(thrustLimit, { thrustLimit: 260 }, [], { ratedThrust: 640, peakThrust: 1600 }),
  by(overloadPlausible, { overloadTime: 1200 }, [], { maxOverloadTime: 1000 }),
  by(quickStopSoft, { quickStopDeceleration: 1500 }, [absolute(3, 50)]),
  by(payload, { payloadMass: 18, mountingAngle: 30 }, [], { maxPayloadLevel: 30, maxPayloadVertical: 12 }),
  by(speedReached, {}, [absolute(1, 0, { next: 2 }), absolute(2, 10)]),
  by(thrustNeeded, { ...loaded, thrustLimit: 10 }, [relative(4, 100, { acceleration: 2500, deceleration: 6000 })], strong),
  by(thrustRms, { ...loaded, payloadMass: 149 }, [absolute(1, 25, { acceleration: 2500, next: 2 }), absolute(2, 0, { acceleration: 2500, next: 1 })], strong),
  by(followingWindow, { followingErrorWindow: 4, inPositionWindow: 0.05, positionGain: 50 }, [absolute(1, 100)]),
  by(homingPlausible, { ...loaded, mountingAngle: 90, homingMethod: 'hard-stop', homingForceLimit: 30 }, [], strong),
  by(pressArrives, { ...loaded, mountingAngle: 90 }, [press(2, 100, 150)], strong),
  by(pressHold, { overloadLevel: 50, overloadTime: 400 }, [press(2, 100, 150, { forceLimit: 60 })]),
  by(stoppingRoom, { ...homed, ...loaded, quickStopDeceleration: 500, thrustLimit: 100 }, [absolute(1, 0, { speed: 25, next: 2 }), absolute(2, 190)], { ...strong, hardMargin: 1 }),
  [addressTwice.id, { input: bus, results: addressTwice.judge(bus) }],
  [sisterOutlier.id, { input: sisters, results: sisterOutlier.judge(sisters) }],
])
