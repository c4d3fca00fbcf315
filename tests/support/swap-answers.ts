import type { ReadBack, Swap, SwapKit, SwapSpares } from '../../shared/api/swaps'
import { before } from './axis-answers'

/* What the interface answers about one swap of an invented lid press: what the pages of a swap are drawn from in tests. */

const unit = (id: number, serial: string, model: string, rest: Partial<NonNullable<Swap['unitIn']>> = {}): NonNullable<Swap['unitIn']> =>
  ({ id, serial, channel: null, model, firmware: '3.12', actuatorSerial: null, actuatorModel: null, location: '', state: 'fitted', modelKnown: true, ...rest })

export const unitOut = unit(5, 'HL40-23-00417', 'HL40-200V', { state: 'failed' })
export const likeUnit = unit(8, 'HL40-25-00958', 'HL40-200V', { state: 'spare', location: 'store A, shelf 1' })
export const otherUnit = unit(9, 'HL50-25-01203', 'HL50-200V', { state: 'spare', location: 'store B, shelf 4', firmware: '3.14' })

/** As it stands right after it was begun. */
export const begun: Swap = {
  id: 118, axisId: 7, tag: 'LID-02.Z', machine: 'LID-02', line: 'Line 1', site: 'Larkfield', timeZone: 'Europe/Berlin', rev: 1, step: 'unit-in', replaced: 'unit',
  failure: 'encoder fault', workOrder: 'WO-4127', openedAt: '2026-11-30T01:19:00.000Z', openedBy: 'Tobias Achterberg', unitOut, unitIn: null, putBack: false, loadCanFall: true,
  fit: null, reasons: [], unfit: null, adjustments: [], forcesConfirmed: null, checks: [], versionId: 14,
  source: { versionId: 14, number: 11, capturedAt: '2026-05-03T05:00:00.000Z', scribeCode: 'TY8D7-BXY3D', serial: 'HL40-23-00417', released: true, mark: { by: 'Runa Haldersen', at: '2026-05-03T07:20:00.000Z' }, chosen: null },
  asFound: null, kit: null, cautions: null, safe: null, readBacks: [], firstMotion: null, ticks: { kit: null, lines: [], written: null, verdict: null, motion: null }, draft: null, taughtMissing: [], running: null, asLeft: null, releaseDueAt: null, released: null, abandoned: null,
  log: [{ rev: 1, at: '2026-11-30T01:19:00.000Z', by: 'Tobias Achterberg', act: 'swap-opened', text: 'began the swap: encoder fault' }],
}

const kit = { scribeCode: 'TBJCX-BNNQC', values: 38, moves: 8, teach: ['positionGain', 'velocityGain'], prove: ['homeOffset', 'frictionForce'], attachmentFits: false, taken: 0 }
export const rescaled: Swap = {
  ...begun, rev: 2, unitIn: otherUnit, fit: 'adjust', kit,
  adjustments: [
    { at: '/setup/thrustLimit', section: 'setup', field: 'thrustLimit', before: 38, after: 30.4, unit: '%', newtonsBefore: 243.2, newtonsAfter: 243.2, why: '100 % is 800 N instead of 640 N.' },
    { at: '/moves/2/forceLimit', section: 'move', row: 2, field: 'forceLimit', before: 32, after: 25.6, unit: '%', newtonsBefore: 204.8, newtonsAfter: 204.8, why: '100 % is 800 N instead of 640 N.' },
  ],
}
export const fitted: Swap = { ...begun, rev: 3, step: 'safe', unitIn: likeUnit, fit: 'same', kit: { ...kit, teach: [], attachmentFits: true }, cautions: { by: 'Tobias Achterberg', at: '2026-11-30T01:40:00.000Z' } }
export const safe: Swap = { ...fitted, rev: 4, step: 'read-back', safe: { by: 'Tobias Achterberg', at: '2026-11-30T02:05:00.000Z', blocked: 'pin' } }

export const attempt = (number: number, rest: Partial<ReadBack> = {}): ReadBack => ({
  attempt: number, at: '2026-11-30T08:02:00.000Z', by: 'Tobias Achterberg', byId: 2, file: 'lid-02.z.json', sha256: 'd'.repeat(64), afterFirstMotion: false, problem: null, detail: null,
  version: { id: 40, number: 12 }, compare: 'same', differences: [], within: 0, aside: [], missingKeys: [], rowsMissing: [], scribeCode: 'TBJCX-BNNQC', ...rest,
})
export const differing = attempt(1, {
  compare: 'differs', scribeCode: 'NBSYZ-7A76A', within: 1,
  differences: [
    { at: '/setup/softLimitMax', section: 'setup', field: 'softLimitMax', before: 184.5, after: 185, unit: 'mm', weight: 'harm', watched: true, tolerance: 0.01 },
    { at: '/moves/3/dwell', section: 'move', row: 3, field: 'dwell', before: 120, after: 0, unit: 'ms', weight: 'motion', watched: false },
  ],
  aside: [{ at: '/setup/homeOffset', section: 'setup', field: 'homeOffset', before: -1.35, after: -1.42, unit: 'mm', weight: 'harm', watched: true }],
})
export const readBack: Swap = { ...safe, rev: 5, step: 'first-motion', readBacks: [attempt(1)] }
export const movedAll: Swap = {
  ...readBack, rev: 9, step: 'running',
  firstMotion: { speedPercent: 10, untried: [], results: ['jog', 'brake-hold', 'move-0', 'chain-3'].map(item => ({ item, outcome: 'ok' as const, text: null, by: 'Tobias Achterberg', at: '2026-11-30T08:44:00.000Z' })) },
}
export const running: Swap = {
  ...movedAll, rev: 11, step: 'release', readBacks: [attempt(1), attempt(2, { afterFirstMotion: true, at: '2026-11-30T09:01:00.000Z', version: { id: 41, number: 12 } })],
  running: { by: 'Tobias Achterberg', at: '2026-11-30T09:05:00.000Z', note: 'Stop lamp: plug X4 was loose.' }, asLeft: { versionId: 41, number: 12, compare: 'same' }, releaseDueAt: '2026-12-01T09:05:00.000Z',
}

export const swapKit: SwapKit = {
  content: JSON.parse(JSON.stringify(before)) as SwapKit['content'], unit: { serial: 'HL40-25-00958', model: 'HL40-200V' }, scribeCode: 'TBJCX-BNNQC', carried: [], teach: [], prove: ['homeOffset', 'frictionForce'], speedPercent: 10,
  firstMotion: [
    { item: 'jog', kind: 'jog', words: 'Jog positive: extends, downwards.', moves: [], endless: false, direction: 'positive', end: null, seconds: null, atLeast: false, inputs: null },
    { item: 'brake-hold', kind: 'brake-hold', words: 'Enable off: the brake holds for 60 s.', moves: [], endless: false, direction: null, end: null, seconds: 60, atLeast: false, inputs: null },
    { item: 'move-0', kind: 'move', words: '0 Top, rest: up to 5 mm.', moves: [0], endless: false, direction: 'negative', end: 5, seconds: 1.04, atLeast: false, inputs: [] },
    { item: 'chain-3', kind: 'chain', words: '3→4→5 runs by itself, 3 movements, ends at 5 mm.', moves: [3, 4, 5], endless: false, direction: 'negative', end: 5, seconds: 5.31, atLeast: false, inputs: [1, 2] },
  ],
}
export const spares: SwapSpares = { items: [
  { unit: likeUnit, fit: 'same', hard: false, reasons: [], adjusted: 0, sameModel: true, sameFirmware: true },
  { unit: otherUnit, fit: 'adjust', hard: false, reasons: [], adjusted: 4, sameModel: false, sameFirmware: false },
  { unit: unit(12, 'HL25-22-00031', 'HL25-100', { state: 'spare' }), fit: 'unfit', hard: true, reasons: [{ code: 'stroke-short', hard: true, message: 'Its stroke of 100 mm is shorter than the 140 mm of move 6.', at: ['/moves/6/target'] }], adjusted: 0, sameModel: false, sameFirmware: false },
] }
