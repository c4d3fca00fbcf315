import { describe, expect, it } from 'vitest'
import type { z } from 'zod'
import { attachmentLimit, attachmentSchema, type Attachment } from '../../../../shared/api/attachments'
import { findingSchema, plannedChangeSchema, type Finding, type PlannedChange } from '../../../../shared/api/findings'
import { historyAct, historyItem, notReadAxis, type HistoryAct, type HistoryItem, type NotReadAxis } from '../../../../shared/api/history'
import { judgedAgain, rejudged, type Rejudged } from '../../../../shared/api/judging'
import { labelSchema, type Label } from '../../../../shared/api/labels'
import { letterKindNames, letterKinds, letterOne, letterQueue, ownLetters, termsOf, watchSchema, type LetterOne, type Watch } from '../../../../shared/api/letters'
import { folderStatus, type FolderStatus } from '../../../../shared/api/line-folders'
import { busGroup, sisterGroup, type SisterGroup } from '../../../../shared/api/neighbours'
import { lacks, readinessSchema } from '../../../../shared/api/readiness'
import { reportBody, reportScopes, reportSchema, type Report } from '../../../../shared/api/reports'
import {
  adjustmentSchema, missingKey, motionItemSchema, readBackAnswer, readBackProblems, readBackSchema, sparesAnswer, swapKitAnswer, swapLine, swapSchema, swapUnit, unfitReason,
  type ReadBack, type Swap, type SwapKit, type SwapLine, type SwapUnit,
} from '../../../../shared/api/swaps'
import { consistencyAnswer, keyAnswer, proofAnswer, trailState, verificationSchema, type TrailState, type Verification } from '../../../../shared/api/trail'
import { judgingContext, uploadSeen, uploadStored, type JudgingContext } from '../../../../shared/api/uploads'
import { valuesAnswer, type ValuesAnswer } from '../../../../shared/api/values'
import { changesAnswer, checkSchema, contentSchema, waivableCheck } from '../../../../shared/api/versions'
import { swapStates, unfitCodes } from '../../../../shared/swap/types'
import { travels, type Travelling } from '../../../support/travelling'

const at = '2026-11-30T08:15:00.000Z'
const hash = 'c4e62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f'
const levels = { stop: 1, warn: 0, note: 2, unknown: 0 }
const content = { axisKind: 'linear', extra: { 'K-1': { value: 3, unit: 'counts' } }, moves: [{ move: 0, kind: 'absolute', target: 0 }], setup: { brakeFitted: false, softLimitMin: 0 }, zones: [{ zone: 1, from: 10, to: 20 }] }
const place = { axisId: 2, tag: 'LID-02.Z', machine: 'Lid press 2', timeZone: 'Europe/Copenhagen' }
const change = { at: '/setup/thrustLimit', section: 'setup', field: 'thrustLimit', before: 38, after: 55, unit: '%', delta: 17, points: 17, weight: 'harm', watched: true } as const

const unit: SwapUnit = { id: 3, serial: 'HL40-2231-0087', channel: null, model: 'HL40-200V', firmware: '2.4', actuatorSerial: null, actuatorModel: null, location: 'shelf 4', state: 'spare', modelKnown: true }
const swap: Partial<Swap> = {
  ...place, id: 1, line: 'Jar line 1', site: 'Larkfield Preserves', rev: 4, step: 'read-back', replaced: 'unit', failure: 'no encoder', workOrder: null, openedAt: at, openedBy: 'Tobias Achterberg', unitOut: unit, unitIn: null, putBack: false,
  loadCanFall: true, fit: 'adjust', reasons: [], unfit: null, adjustments: [], forcesConfirmed: null, checks: [], versionId: 7, source: null, asFound: null, kit: null, cautions: null, safe: { by: 'Tobias Achterberg', at, blocked: 'prop' },
  readBacks: [], firstMotion: null, ticks: { kit: null, lines: [{ line: 'setup', words: 'Write the setup.', by: 'Tobias Achterberg', at }], written: null, verdict: null, motion: null }, draft: null, taughtMissing: ['homeOffset'], running: null, asLeft: null, releaseDueAt: null, released: null, abandoned: null, log: [{ rev: 4, at, by: 'Tobias Achterberg', act: 'safe', text: 'Made safe.' }],
}
const readBack: Partial<ReadBack> = {
  attempt: 2, at, by: 'Tobias Achterberg', byId: 2, file: null, sha256: hash, afterFirstMotion: false, problem: null, detail: null, version: { id: 9, number: 5 }, compare: 'differs', differences: [{ ...change, tolerance: 0.01 }], within: 1,
  aside: [], missingKeys: [{ key: 'extra:K-1', weight: 'motion', accepted: false }], rowsMissing: [{ section: 'zone', row: 2 }], scribeCode: null,
}
const line: Partial<SwapLine> = { ...place, id: 1, step: 'running', replaced: 'drive', failure: 'trips', openedAt: at, openedBy: 'Tobias Achterberg', changedAt: at, serialOut: null, serialIn: 'HL40-2231-0091', runningSince: at, releaseDueAt: at, overdue: false }
const kit: Partial<SwapKit> = {
  content: content as SwapKit['content'], unit: { serial: 'TO-BE-WRITTEN', model: 'HL40-200V' }, scribeCode: 'RKK20-GSKBY', carried: [{ section: 'setup', field: 'homeOffset', carry: 'teach', why: 'x' }, { section: 'move', carry: 'copy', why: 'x' }],
  teach: ['homeOffset'], prove: [], firstMotion: [], speedPercent: 10,
}
const act = { kind: 'explained', at, by: 'Runa Haldersen', text: 'new lids', madeBy: null, madeAt: null, workOrder: null, plannedChangeId: null, as: null, allowedBy: null, version: null } as const
const finding: Partial<Finding> = {
  id: 1, state: 'explained', cause: 'watched-change', weight: 'harm', title: 'Thrust limit 38 → 55 %', axisId: null, tag: null, timeZone: null, openedAt: at, dueAt: at, overdue: false, changes: [change],
  versions: [{ at, axisId: 2, tag: 'LID-02.Z', versionId: null, number: null, capturedAt: null, baseId: null, baseNumber: null, says: 'x', changes: [] }], more: 0, explanations: [act], closure: null, acts: [act],
}
const planned: Partial<PlannedChange> = {
  id: 1, axes: [{ id: 2, tag: 'LID-02.Z' }], fields: ['thrustLimit'], min: null, max: 55, from: at, until: at, reason: 'new lids', allowedBy: 'person:1', announcedAt: at, announcedBy: 'Runa Haldersen', timeZone: 'UTC',
  endedAt: null, endedBy: null, endReason: null, came: [{ findingId: 1, at, tag: 'LID-02.Z', versionId: null, number: null, title: 'x', state: 'closed' }],
}
const item: Partial<HistoryItem> = {
  versionId: 7, axisId: 2, tag: 'LID-02.Z', section: 'move', row: null, field: 'speed', before: null, after: 250, unit: null, delta: null, points: null, weight: 'motion', at, capturedAt: at, changedBy: null, storedBy: 'Tobias Achterberg',
  reason: null, workOrder: null, allowedBy: null, findingId: null, number: 4, baseId: null, baseNumber: null, baseAt: null, seq: 0, timeZone: 'UTC', serial: 'HL40-2231-0087', occasion: 'as-found', late: false, void: false,
  findingState: null, explanation: null, explainedBy: null,
}
const historic: Partial<HistoryAct> = { seq: 4, at, by: 'Marit', act: 'person-changed', subject: 'Runa Haldersen', changes: [{ field: 'roles', before: ['auditor'], after: null }, { field: 'name' }], note: null }
const notRead: Partial<NotReadAxis> = { ...place, line: 'Jar line 1', site: 'Larkfield Preserves', status: 'never-read', uploadEveryHours: null, lastUploadAt: null }
const again: Partial<Rejudged> = { axisId: 2, tag: 'LID-02.Z', versionId: 7, number: 4, before: levels, after: levels, stops: 1, message: null }
const label: Partial<Label> = { axisId: 2, tag: 'LID-02.Z', role: 'lid press', machine: 'Lid press 2', line: 'Jar line 1', falls: true, address: 'https://vault.example/a/LID-02.Z', printed: null }
const letter: Partial<LetterOne> = {
  id: 1, kind: 'watched-change', to: { id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example' }, title: 'x', path: '/axes/2', state: 'queued', madeAt: at, attempts: 0, nextTryAt: null, settledAt: null, problem: null, messageId: 'x', text: 'x',
}
const watch: Watch = { scope: 'line', scopeId: 1, name: 'Jar line 1' }
const folder: Partial<FolderStatus> = { lineId: 1, line: 'Jar line 1', site: 'Larkfield Preserves', timeZone: 'UTC', axes: 4, kept: null, failed: null }
const sisters: Partial<SisterGroup> = { role: 'lid press', model: 'HL40-200V', of: 6, axes: [{ id: 2, tag: 'LID-02.Z', machineId: 1 }], rows: [{ key: 'thrustLimit', words: 'thrust limit', same: false, texts: ['38 %'], odd: [0] }], results: [], more: 0 }
const verification: Verification = { id: 1, begunAt: at, endedAt: at, outcome: 'damage', entries: 4, rows: 9, faults: 1, found: [{ record: 'version 7', fault: 'x' }] }
const trail: TrailState = { size: 9, checkpoint: null, verifications: [verification], verifying: false }
const values: ValuesAnswer = { section: 'setup', field: 'thrustLimit', row: null, steps: [], knownGood: [{ versionId: 7, number: 4, from: at, to: null, value: null }], bounds: [{ by: 'rule', max: 50, from: at, to: null, words: 'guard' }], versions: 3, leftOut: 0 }
const attachment: Attachment = { id: 1, versionId: 7, kind: 'photo', name: 'plate.jpg', mediaType: 'image/jpeg', note: null, size: 12, sha256: hash, receivedAt: at, by: 'Tobias Achterberg', unit: { serial: 'HL40-2231-0087', model: 'HL40-200V' } }
const report: Report = { id: 1, scope: null, scopeId: null, subject: 'every axis', timeZone: 'UTC', from: null, to: null, paper: 'A4', askedAt: at, askedBy: 'Ines', size: 41, making: null }
const context: Partial<JudgingContext> = { problem: null, registered: null, axis: null, current: null, knownGood: null, broughtFrom: null, waivers: [], nextNumber: 1, nameplate: null, rules: [] }

const records: readonly Travelling[] = [
  { what: 'a unit of a swap', schema: swapUnit, record: unit, nullable: ['channel', 'firmware', 'actuatorSerial', 'actuatorModel'] },
  { what: 'a swap', schema: swapSchema, record: swap, nullable: [
    'workOrder', 'unitOut', 'unitIn', 'fit', 'unfit', 'forcesConfirmed', 'versionId', 'source', 'asFound', 'kit', 'cautions', 'safe', 'firstMotion', 'draft', 'running', 'asLeft', 'releaseDueAt', 'released', 'abandoned'] },
  { what: 'a read-back', schema: readBackSchema, record: readBack, nullable: ['file', 'problem', 'detail', 'version', 'compare', 'scribeCode'] },
  { what: 'a line of the swaps', schema: swapLine, record: line, nullable: ['serialOut', 'serialIn', 'runningSince', 'releaseDueAt'] },
  { what: 'a kit', schema: swapKitAnswer, record: kit, nullable: [] },
  { what: 'an adjustment', schema: adjustmentSchema, record: { at: '/setup/thrustLimit', section: 'setup', field: 'thrustLimit', before: 38, after: 23.75, unit: '%', newtonsBefore: 152, newtonsAfter: 152, why: 'x' }, nullable: ['newtonsBefore', 'newtonsAfter'], optional: ['row'] },
  { what: 'a reason why it does not fit', schema: unfitReason, record: { code: 'stroke-short', hard: true, message: 'x', at: ['/moves'] }, nullable: [] },
  { what: 'a key that the unit lacks', schema: missingKey, record: { key: 'move.window', weight: 'motion', accepted: true }, nullable: [] },
  { what: 'a line of the first motion', schema: motionItemSchema, record: { item: 'move-5', kind: 'move', words: 'x', moves: [5], endless: false, direction: 'either', end: null, seconds: 1.5, atLeast: false, inputs: [0, 2] }, nullable: ['direction', 'end', 'seconds', 'inputs'] },
  { what: 'a finding', schema: findingSchema, record: finding, nullable: ['axisId', 'tag', 'timeZone', 'closure'] },
  { what: 'a planned change', schema: plannedChangeSchema, record: planned, nullable: ['min', 'max', 'endedAt', 'endedBy', 'endReason'] },
  { what: 'a line of the history', schema: historyItem, record: item, nullable: [
    'row', 'before', 'after', 'unit', 'delta', 'points', 'changedBy', 'reason', 'workOrder', 'allowedBy', 'findingId', 'baseId', 'baseNumber', 'baseAt', 'findingState', 'explanation', 'explainedBy'] },
  { what: 'an act of the history', schema: historyAct, record: historic, nullable: ['note'] },
  { what: 'an axis that was not read', schema: notReadAxis, record: notRead, nullable: ['uploadEveryHours', 'lastUploadAt'] },
  { what: 'a version that is judged otherwise', schema: rejudged, record: again, nullable: ['message'] },
  { what: 'a judgement', schema: judgedAgain, record: { changed: true, checks: [] }, nullable: [] },
  { what: 'a label', schema: labelSchema, record: label, nullable: ['printed'] },
  { what: 'a letter', schema: letterOne, record: letter, nullable: ['nextTryAt', 'settledAt', 'problem'] },
  { what: 'the letters that wait', schema: letterQueue, record: { waiting: 0, waitingSince: null, way: 'folder', publicUrl: false }, nullable: ['waitingSince'] },
  { what: 'a watch', schema: watchSchema, record: watch, nullable: [] },
  { what: 'one’s own letters', schema: ownLetters, record: { choices: [{ kind: 'watched-change', says: 'x', reach: 'watchers', wanted: true }], watches: [watch] }, nullable: [] },
  { what: 'the folder of a line', schema: folderStatus, record: folder, nullable: ['kept', 'failed'] },
  { what: 'sisters', schema: sisterGroup, record: sisters, nullable: [] },
  { what: 'the axes of a bus', schema: busGroup, record: { bus: 'press bus', of: 2, results: [], more: 0 }, nullable: [] },
  { what: 'whether it could be restored', schema: readinessSchema, record: { ready: false, lacks: ['no-spare'] }, nullable: [] },
  { what: 'a verification', schema: verificationSchema, record: verification, nullable: [] },
  { what: 'the trail', schema: trailState, record: trail, nullable: ['checkpoint'] },
  { what: 'a proof', schema: proofAnswer, record: { entry: 3, size: 7, leafHash: hash, path: [hash] }, nullable: [] },
  { what: 'a proof that nothing was rewritten', schema: consistencyAnswer, record: { from: 3, to: 7, path: [hash] }, nullable: [] },
  { what: 'the key of the trail', schema: keyAnswer, record: { name: 'larkfield', publicKey: hash, verifierKey: 'x' }, nullable: [] },
  { what: 'the values of a field', schema: valuesAnswer, record: values, nullable: ['row'] },
  { what: 'an attachment', schema: attachmentSchema, record: attachment, nullable: ['note'] },
  { what: 'a report', schema: reportSchema, record: report, nullable: ['scope', 'scopeId', 'from', 'to', 'making'] },
  { what: 'what a file is judged against', schema: judgingContext, record: context, nullable: ['problem', 'registered', 'axis', 'current', 'knownGood', 'broughtFrom', 'nameplate'] },
]

describe.each(records)('$what as it travels', travels)

const takes = (schema: z.ZodType, value: unknown) => schema.safeParse(value).success
const each = (schema: z.ZodObject, record: object, name: string, taken: readonly unknown[], refused: readonly unknown[]) => {
  for (const value of taken) expect(takes(schema, { ...record, [name]: value }), `${name} takes ${JSON.stringify(value)}`).toBe(true)
  for (const value of refused) expect(takes(schema, { ...record, [name]: value }), `${name} refuses ${JSON.stringify(value)}`).toBe(false)
}

describe('words that travel', () => {
  it('of a swap are those of the swap’s own tables', () => {
    each(swapSchema, swap, 'step', swapStates, ['done', 'kit', ''])
    each(swapSchema, swap, 'replaced', ['unit', 'drive', 'actuator'], ['motor'])
    each(swapSchema, swap, 'fit', ['same', 'adjust', 'unfit', null], ['likely'])
    each(swapSchema, swap, 'safe', ['prop', 'pin', 'lowered', null].map(blocked => ({ by: 'x', at, blocked })), [{ by: 'x', at, blocked: 'rope' }, { by: 'x', at }])
    each(unfitReason, { hard: true, message: 'x', at: [] }, 'code', unfitCodes, ['too-old'])
    each(readBackSchema, readBack, 'problem', [...readBackProblems, null], ['late'])
    each(readBackSchema, readBack, 'compare', ['identical', 'same', 'differs', null], ['equal'])
    each(readBackSchema, readBack, 'rowsMissing', [[], [{ section: 'move', row: 0 }]], [[{ section: 'setup', row: 0 }], [{ section: 'move' }]])
  })

  it('of a readiness are all that an axis may lack, each as often as it is told', () => {
    each(readinessSchema, { ready: false }, 'lacks', [[], [...lacks]], [['no-time'], 'no-spare'])
  })

  it('a hash is 64 hex digits in lower case', () => {
    each(proofAnswer, { entry: 0, size: 1, path: [] }, 'leafHash', [hash], [hash.toUpperCase(), hash.slice(1), `${hash}0`, `g${hash.slice(1)}`])
    each(proofAnswer, { entry: 0, size: 1, leafHash: hash }, 'path', [[], [hash, hash]], [['x'], hash])
  })
})

describe('answers that are made of others', () => {
  it('a read-back is answered by the whole swap and its own attempt', () => {
    expect(Object.keys(readBackAnswer.shape)).toEqual(expect.arrayContaining([...Object.keys(swapSchema.shape), 'attempt', 'version', 'compare', 'differences', 'aside', 'missingKeys']))
    expect(takes(readBackAnswer, swap)).toBe(false)
  })

  it('a spare says whether its reasons are hard, even without one', () => {
    const spare = { unit, fit: 'same', hard: false, reasons: [], adjusted: 0, sameModel: true, sameFirmware: true }
    expect(takes(sparesAnswer, { items: [spare] })).toBe(true)
    for (const key of Object.keys(spare)) expect(takes(sparesAnswer, { items: [{ ...spare, [key]: undefined }] }), key).toBe(false)
  })

  it('a stored upload, a sighting and a difference have no part left out', () => {
    for (const schema of [uploadStored, uploadSeen, changesAnswer, waivableCheck]) expect(takes(schema, {})).toBe(false)
    expect(takes(changesAnswer, { compare: 'differs', changes: [change], renumbered: [{ first: 3, last: 14, by: 1, sure: true }], told: { pairs: [{ before: 3, after: 4 }, { after: 3 }, {}], changes: [] } })).toBe(true)
    expect(takes(changesAnswer, { compare: 'same', changes: [], renumbered: [] })).toBe(true)
  })

  it('a check carries numbers, texts, and lists of either; nothing deeper', () => {
    const check = { rule: 'travel-span', level: 'stop', at: ['/setup/softLimitMax'], message: 'x' }
    each(checkSchema, check, 'values', [{}, { span: 190, unit: 'mm', moves: [1, 2], missing: ['a'] }], [{ span: true }, { span: null }, { moves: [[1]] }, [1]])
    each(checkSchema, { ...check, values: {} }, 'level', ['stop', 'warn', 'note', 'unknown'], ['error'])
  })

  it('a content travels as it was hashed: values of a setting, rows of numbers and words, zones with both ends', () => {
    expect(takes(contentSchema, content)).toBe(true)
    each(contentSchema, content, 'zones', [[]], [[{ zone: 1, from: 0 }], [{ zone: 1.5, from: 0, to: 1 }]])
    each(contentSchema, content, 'moves', [[], [{}]], [[{ label: true }], [{ next: null }]])
    each(contentSchema, content, 'setup', [{}, { a: 'x', b: 1, c: true }], [{ a: null }, { a: [1] }])
  })
})

describe('letters', () => {
  it('say in a sentence what they are about, and go only to whom they may', () => {
    for (const kind of letterKindNames) {
      const { may, unasked, says } = termsOf(kind)
      expect(says, kind).toMatch(/^[A-Z].+\.$/)
      expect(unasked.filter(role => !may.includes(role)), kind).toEqual([])
      expect(unasked.length, kind).toBeGreaterThan(0)
    }
  })

  it('about the vault as a whole go to auditors and administrators alone, the checkpoint to auditors', () => {
    for (const kind of letterKindNames.filter(name => termsOf(name).reach === 'vault')) expect(termsOf(kind).may.filter(role => role === 'planner' || role === 'technician'), kind).toEqual([])
    expect(letterKinds.checkpoint.may).toEqual(['auditor'])
  })

  it('about one axis reach those who watch it, whatever their part', () => {
    for (const kind of letterKindNames.filter(name => termsOf(name).reach === 'watchers')) expect(termsOf(kind).may).toEqual(['technician', 'planner', 'auditor', 'admin'])
  })
})

describe('a report that is asked for', () => {
  it('is of a place by its kind and its id, or of every axis: half of a place is refused at the other half', () => {
    for (const body of [{}, { scope: 'line', scopeId: 1 }]) expect(takes(reportBody, body)).toBe(true)
    for (const body of [{ scope: 'line' }, { scopeId: 1 }]) expect(reportBody.safeParse(body).error?.issues.map(({ path }) => path)).toEqual([['scopeId']])
    each(reportBody, { scopeId: 1 }, 'scope', reportScopes, ['plant', 'unit', null])
    each(reportBody, { scope: 'axis' }, 'scopeId', [1, Number.MAX_SAFE_INTEGER], [0, 1.5, '1', null])
  })
})

describe('attachments', () => {
  it('are at most 20 MiB', () => expect(attachmentLimit).toBe(20_971_520))
})
