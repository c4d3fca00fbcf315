import { accelerationLimit } from './acceleration-limit'
import { brakeAgrees } from './brake-agrees'
import { brakeVertical } from './brake-vertical'
import { chainAfterPress } from './chain-after-press'
import { chainEndless } from './chain-endless'
import { chainTarget } from './chain-target'
import { extraRange } from './extra-range'
import { followingWindow } from './following-window'
import { forceRescale } from './force-rescale'
import { homeSide } from './home-side'
import { homingPlausible } from './homing-plausible'
import { overloadPlausible } from './overload-plausible'
import { payload } from './payload'
import { polarityFlip } from './polarity-flip'
import { pressArrives } from './press-arrives'
import { pressForce } from './press-force'
import { pressHold } from './press-hold'
import { pressPath } from './press-path'
import { pressSpeed } from './press-speed'
import { quickStopSoft } from './quick-stop-soft'
import { relativeStep } from './relative-step'
import { selectReach } from './select-reach'
import { siteRule } from './site-rule'
import { softLimitsOff } from './soft-limits-off'
import { speedLimit } from './speed-limit'
import { speedReached } from './speed-reached'
import { startTiming } from './start-timing'
import { stoppingRoom } from './stopping-room'
import { targetGrid } from './target-grid'
import { targetInside } from './target-inside'
import { thrustLimit } from './thrust-limit'
import { thrustNeeded } from './thrust-needed'
import { thrustRms } from './thrust-rms'
import { travelPlaced } from './travel-placed'
import { travelSpan } from './travel-span'
import { twinMoves } from './twin-moves'
import type { Rule } from './types'
import { unitMatches } from './unit-matches'
import { unusedRows } from './unused-rows'
import { windowGrid } from './window-grid'
import { zoneReach } from './zone-reach'

/** Kept beside stored results. Raise it with every change that can give one content another answer. */
export const ruleSetVersion = '4'

/** All rules, in the order in which results of one level are told. */
export const rules: readonly Rule[] = [
  travelSpan, travelPlaced, softLimitsOff, targetInside, relativeStep,
  pressPath, pressForce, pressArrives, pressHold, pressSpeed,
  thrustLimit, overloadPlausible, speedLimit, accelerationLimit, quickStopSoft, speedReached, thrustNeeded, thrustRms, payload,
  stoppingRoom, followingWindow, windowGrid, targetGrid,
  chainTarget, chainEndless, chainAfterPress, selectReach, startTiming, zoneReach,
  homingPlausible, homeSide, brakeVertical, brakeAgrees, polarityFlip,
  twinMoves, unusedRows, unitMatches, forceRescale, siteRule, extraRange,
]

const byId = new Map(rules.map(rule => [rule.id, rule]))

/** The rule of an id; undefined for an id of another rule set, as stored results may carry. */
export function ruleOf(id: string): Rule | undefined {
  return byId.get(id)
}
