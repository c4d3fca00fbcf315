import { usedRows, type Row } from '../motion/chains'
import { isAbove } from '../motion/exact'
import { directionOf, needOf, phaseOf, phases, type Effort, type Phase } from '../motion/thrust'
import { answers } from './answers'
import { bindingLimit } from './binding-limit'
import { weigh, type Burden } from './burden'
import { drivenRows, type Driven } from './driven'
import { about, inWords } from './format'
import { atMove, atSetup } from './pointers'
import type { CheckResult, JudgeInput, Rule } from './types'

const { stop, warn, unknown } = answers('thrust-needed')

/** Share of the limit from which little is left for wear and cold grease. */
const near = 80

export const thrustNeeded: Rule = {
  id: 'thrust-needed',
  title: 'Thrust needed',
  reason: 'A load that the limited thrust cannot hold sinks, one that it cannot brake runs on, and one that it cannot speed up lags until the drive gives up.',
  formula: 'hold, brake, accelerate: F = (m + mR)·ẍ + m·g·sin θ + sign(ẋ)·Ff, rotary T = (J + rotorInertia·gearRatio²)·α·π/180 ± unbalanceTorque·sin(tilt) + sign(ω)·Tf; above the limit of its sign: stop, above 80 %: warn; a press up to its approach',
  levels: ['stop', 'warn', 'unknown'],
  applies: ({ content }) => usedRows(content.moves).length > 0,
  judge,
}

function judge(input: JudgeInput): CheckResult[] {
  const { burden, missing } = weigh(input)
  if (!burden) return [unknown('Thrust', missing, [atSetup(input.content.axisKind === 'linear' ? 'payloadMass' : 'payloadInertia')])]
  const open: Row[] = []
  const ofAxis = limitsOf(input, burden)
  const results = drivenRows(input).flatMap((driven) => {
    const limits = driven.row.move.forceLimit === undefined ? ofAxis : limitsOf(input, burden, driven.row)
    const needs = needsOf(limits, burden, driven)
    if (needs.some(({ limit }) => limit === Infinity)) open.push(driven.row)
    return verdict(driven.row, needs, burden)
  })
  return open.length === 0 ? results : [...results, unknown('Thrust', ['thrustLimit'], open.map(row => atMove(row)))]
}

/** The worst of one phase. */
interface Need { readonly phase: Phase, readonly sign: 1 | -1, readonly need: number, readonly limit: number, readonly at: readonly string[] }

/** What the thrust of one sign may be, N or N·m, and where that stands. */
interface SignLimit { readonly sign: 1 | -1, readonly limit: number, readonly at: readonly string[] }

/** The limits of both signs; of a row that may have a limit of its own, or of the axis. */
function limitsOf(input: JudgeInput, { base }: Burden, row?: Row): SignLimit[] {
  return ([1, -1] as const).map((sign) => {
    const { percent, at } = bindingLimit(input, sign, row)
    return { sign, limit: percent / 100 * base, at }
  })
}

function needsOf(limits: readonly SignLimit[], { effortOf }: Burden, { ways }: Driven): Need[] {
  const worst: Partial<Record<Phase, Need>> = {}
  const ask = (phase: Phase, effort: Effort) => {
    for (const { sign, limit, at } of limits) {
      const need = needOf(effort, sign)
      const other = worst[phase]
      if (need > 0 && (!other || need * other.limit > other.need * limit)) worst[phase] = { phase, sign, need, limit, at }
    }
  }
  ask('hold', effortOf(0, 0))
  for (const { profile: { segments, approachAt = Infinity } } of ways) {
    for (const segment of segments) {
      const phase = segment.t0 < approachAt ? phaseOf(segment) : undefined
      if (phase) ask(phase, effortOf(segment.a, directionOf(segment)))
    }
  }
  return phases.map(phase => worst[phase]).filter(need => need !== undefined)
}

function verdict(row: Row, needs: readonly Need[], { unit, without }: Burden): CheckResult[] {
  const over = needs.filter(({ need, limit }) => isAbove(need, limit))
  const told = over.length > 0 ? over : needs.filter(({ need, limit }) => isAbove(need, near / 100 * limit))
  const [lead, ...others] = told
  if (!lead) return []
  const { move } = row.move
  const { phase, sign, need, limit } = lead
  const also = others.length === 0 ? '' : `, and too much ${inWords(others.map(other => words[other.phase]))} as well`
  const share = limit > 0 ? `${about(100 * need / limit, over.length > 0 ? 100 : undefined)} % of the ${about(limit)} ${unit} that its limit leaves` : 'and its limit leaves none'
  return [(over.length > 0 ? stop : warn)([...new Set([...told.map(one => placeOf(row, one.phase)), ...lead.at])],
    `Move ${move} needs ${about(need)} ${unit} towards ${sign === 1 ? 'plus' : 'minus'} ${words[phase]}, ${share}${over.length > 0 ? also : ''}${without}.`,
    { move, phase, need, limit, ...limit > 0 ? { percent: 100 * need / limit } : {} })]
}

const words: Readonly<Record<Phase, string>> = { hold: 'to hold the load', brake: 'to brake', accelerate: 'to speed up' }

function placeOf(row: Row, phase: Phase): string {
  if (phase === 'hold') return atMove(row)
  return atMove(row, phase === 'brake' && row.move.deceleration !== undefined ? 'deceleration' : 'acceleration')
}
