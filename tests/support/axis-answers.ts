import type { Axis, ChangesAnswer, LifeEvent, VersionOne } from '../../shared/api/versions'
import { judge } from '../../shared/checks/judge'
import { diffContents } from '../../shared/diff/diff'
import { diffRenumbered } from '../../shared/diff/renumber'
import { countByWeight } from '../../shared/diff/summary'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { Content } from '../../shared/settings/types'

/* What the interface answers about one invented lid press: what pages of an axis are drawn from in tests. */

export const nameplate: Nameplate = {
  model: 'HL40-200V', axisKind: 'linear', stroke: 200, hardMargin: 1, ratedThrust: 640, peakThrust: 1600, maxSpeed: 500, maxAcceleration: 8000,
  dictionary: { 'K-017': { name: 'filter step, drive’s own' } },
}

export const before: Content = {
  axisKind: 'linear', extra: { 'K-017': 4 }, zones: [{ zone: 0, from: 0, to: 12 }, { zone: 1, from: 98, to: 106 }],
  setup: {
    positiveDirection: 'extend', softLimitsActive: true, softLimitMin: 2, softLimitMax: 185, homeOffset: 0.65, homingMethod: 'hard-stop', homingDirection: 'negative', homingSpeed: 40,
    homingCreepSpeed: 5, homingAcceleration: 400, homingForceLimit: 25, thrustLimit: 38, overloadLevel: 60, overloadTime: 400, speedLimit: 400, accelerationLimit: 4000, decelerationLimit: 4000,
    quickStopDeceleration: 6000, jogSpeed: 25, pressSpeed: 20, jerk: 60000, inPositionWindow: 0.05, payloadMass: 6.5, mountingAngle: -90, frictionForce: 25, positionGain: 45, velocityGain: 310,
    velocityIntegralTime: 12.5, inputSwitching: 'p', outputSwitching: 'p', selectInputs: 3, selectSettleTime: 6, startPulseTime: 8, onEnableLoss: 'stop-and-hold', brakeFitted: true, nodeAddress: 23,
  },
  moves: [
    { move: 0, label: 'Top, rest', kind: 'absolute', target: 5, speed: 250, acceleration: 2000 },
    { move: 1, label: 'Over lid', kind: 'absolute', target: 62, speed: 250, acceleration: 2000 },
    { move: 2, label: 'Seat lid', kind: 'press', target: 104, approach: 88, speed: 180, acceleration: 1500, forceLimit: 32 },
    { move: 3, label: 'Ease off', kind: 'absolute', target: 96.5, speed: 40, acceleration: 500, next: 4, dwell: 120 },
    { move: 4, label: 'Clear lid', kind: 'absolute', target: 62, speed: 250, acceleration: 2500, next: 5, dwell: 0 },
    { move: 5, label: 'Up', kind: 'absolute', target: 5, speed: 300, acceleration: 2500 },
    { move: 6, label: 'Service, down', kind: 'absolute', target: 140, speed: 120, acceleration: 1000 },
    { move: 7, label: 'Step up', kind: 'relative', target: -2, speed: 20, acceleration: 200 },
  ],
}

export const after: Content = {
  ...before,
  setup: { ...before.setup, thrustLimit: 55, positionGain: 52, inPositionWindow: 0.1 },
  moves: [
    ...before.moves.slice(0, 1),
    { move: 1, label: 'Over lid', kind: 'absolute', target: 70, speed: 320, acceleration: 3200, deceleration: 2000 },
    { move: 2, label: 'Seat lid, first', kind: 'press', target: 104, approach: 88, speed: 180, acceleration: 1500, forceLimit: 36 },
    { move: 3, label: 'Seat lid, again', kind: 'press', target: 104, approach: 98, speed: 60, acceleration: 800, forceLimit: 36 },
    ...before.moves.slice(3).map(move => ({ ...move, move: move.move + 1, ...(move.next !== undefined && { next: move.next + 1 }) })),
  ],
}

const wireContent = (content: Content) => JSON.parse(JSON.stringify(content)) as VersionOne['content']

export function versionAnswer(number: number, content: Content, rest: Partial<VersionOne> = {}): VersionOne {
  const judgement = judge({
    content, axis: { axisKind: content.axisKind, flags: ['press', 'gravity'] }, unit: { model: 'HL40-200V', firmware: '3.12' }, registered: { model: 'HL40-200V' }, nameplate,
    rules: [{ id: 1, scope: 'site', field: 'thrustLimit', max: 45, reason: 'jars crack above 300 N' }],
  })
  const count = (level: string) => judgement.results.filter(result => result.level === level).length
  return {
    id: number, axisId: 7, axisTag: 'LID-03.Z', unitId: 5, serial: 'HL40-24-00817', number, occasion: 'routine',
    capturedAt: '2026-09-02T04:10:00.000Z', receivedAt: '2026-09-02T04:11:00.000Z', clockDoubtful: false, late: false, current: number === 15, void: null,
    baseId: number - 1, baseNumber: number - 1, contentHash: 'a'.repeat(64), copyHash: 'b'.repeat(64), scribeCode: number === 15 ? '2HAXQ-PEW44' : 'EJ26R-33XTH',
    storedBy: 'station 2, nightly', changedBy: null, allowedBy: null, reason: null, workOrder: null, firmware: '3.12', model: 'HL40-200V', sightings: 0, lastSeenAt: null, mark: null,
    changeCounts: { harm: 0, motion: 0, text: 0 }, checkCounts: { stop: count('stop'), warn: count('warn'), note: count('note'), unknown: count('unknown') },
    content: wireContent(content), checks: JSON.parse(JSON.stringify(judgement.results)) as VersionOne['checks'],
    judged: { ruleSet: judgement.ruleSet, nameplateRevision: 2, judgedAt: '2026-11-30T05:12:04.000Z', judged: [...judgement.judged], notApplicable: [...judgement.notApplicable] },
    unit: { serial: 'HL40-24-00817', model: 'HL40-200V', firmware: '3.12' }, exportedAt: '2026-11-30T06:12:00+01:00', exportedBy: 'HL Studio 4', note: null, readings: { 'Run hours': { value: 8120, unit: 'h' } },
    upload: { name: 'lid-03.z.json', bytes: 4211, sha256: 'c'.repeat(64), form: 'json' }, normalised: { rounded: 0, converted: 2, encoding: 'utf-8' },
    ...rest,
  }
}

export const knownGood = versionAnswer(14, before, {
  changedBy: 'Tobias Achterberg', allowedBy: 'Runa Haldersen', reason: 'Softer approach after two cracked jars', workOrder: 'WO-3390', sightings: 88, lastSeenAt: '2026-11-29T05:10:00.000Z',
  mark: { by: 'Runa Haldersen', at: '2026-09-03T07:20:00.000Z', meaning: 'approved', note: null, inForce: true },
})
export const today = versionAnswer(15, after, { capturedAt: '2026-11-30T05:12:00.000Z', receivedAt: '2026-11-30T05:12:04.000Z' })

const diffContext = { flags: ['press', 'gravity'], ...(nameplate.dictionary && { dictionary: nameplate.dictionary }) } as const

export function changesAnswer(one: Content, other: Content): ChangesAnswer {
  const changes = diffContents(one, other, diffContext)
  const told = diffRenumbered(one, other, diffContext)
  const answer = { compare: changes.length ? 'differs' : 'identical', changes, renumbered: told?.renumbered ?? [], ...(told && { told: { pairs: told.pairs, changes: told.changes } }) }
  return JSON.parse(JSON.stringify(answer)) as ChangesAnswer
}

export const axis: Axis = {
  id: 7, rev: 3, tag: 'LID-03.Z', axisKind: 'linear', role: 'seat lid', flags: ['press', 'gravity'], bus: 'line 1', uploadEveryHours: 24, duty: null,
  machine: { id: 3, name: 'LID-03' }, line: { id: 1, name: 'Line 1' }, site: { id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' },
  status: 'off', off: countByWeight(diffRenumbered(before, after, diffContext)?.changes ?? []), sense: 'more',
  knownGood: { versionId: 14, number: 14, by: 'Runa Haldersen', at: '2026-09-03T07:20:00.000Z', scribeCode: 'EJ26R-33XTH' },
  unit: { id: 5, serial: 'HL40-24-00817', channel: null, model: 'HL40-200V', firmware: '3.12', since: '2026-01-21T02:40:00.000Z' },
  current: { versionId: 15, number: 15, capturedAt: '2026-11-30T05:12:00.000Z', scribeCode: '2HAXQ-PEW44', firmware: '3.12' },
  lastUploadAt: '2026-11-30T05:12:00.000Z', overdueSince: null, checks: { stop: 1, warn: 1, note: 2, unknown: 0 }, readiness: { ready: false, lacks: ['no-spare', 'no-label'] }, swap: null, versions: 15, sightings: 611,
}

const event = (kind: LifeEvent['kind'], at: string, rest: Partial<LifeEvent> = {}): LifeEvent =>
  ({ at, kind, findingId: null, versionId: null, number: null, by: 'Runa Haldersen', text: null, serial: null, changes: null, occasion: null, sightings: null, ...rest })
const version = (number: number, at: string, rest: Partial<LifeEvent> = {}) =>
  event('version', at, { number, versionId: number, by: 'station 2, nightly', occasion: 'routine', changes: { harm: 0, motion: 1, text: 0 }, sightings: 40, ...rest })

export const life: readonly LifeEvent[] = [
  version(15, '2026-11-30T05:12:00.000Z', { changes: axis.off, sightings: 0 }),
  event('mark', '2026-09-03T07:20:00.000Z', { number: 14, text: 'approved' }),
  version(14, '2026-09-02T04:10:00.000Z', { sightings: 88, changes: { harm: 1, motion: 0, text: 1 } }),
  version(13, '2026-08-28T04:10:00.000Z'), event('mark', '2026-05-18T12:02:00.000Z', { number: 12, text: 'approved' }), version(12, '2026-05-12T04:10:00.000Z'), version(11, '2026-02-02T04:10:00.000Z'),
  event('mark', '2026-01-22T08:00:00.000Z', { number: 10, text: 'responsibility' }), version(10, '2026-01-21T03:40:00.000Z', { occasion: 'as-left' }),
  event('fitted', '2026-01-21T02:40:00.000Z', { serial: 'HL40-24-00817' }), event('taken-out', '2026-01-21T02:00:00.000Z', { serial: 'HL40-23-00392', text: 'failed' }),
  event('mark', '2025-11-20T08:00:00.000Z', { number: 9, text: 'approved' }), version(9, '2025-11-19T04:10:00.000Z'), version(8, '2025-11-17T04:10:00.000Z'), version(7, '2025-09-30T04:10:00.000Z'),
  event('mark', '2025-06-03T08:00:00.000Z', { number: 4, text: 'approved' }), version(4, '2025-06-02T04:10:00.000Z'), version(3, '2025-03-20T04:10:00.000Z'),
  event('mark', '2025-02-21T08:00:00.000Z', { number: 2, text: 'reviewed' }), version(2, '2025-02-20T04:10:00.000Z'), version(1, '2025-02-12T09:00:00.000Z', { changes: null, occasion: 'commissioning' }),
  event('fitted', '2025-02-12T07:00:00.000Z', { serial: 'HL40-23-00392' }),
]
