import { z } from 'zod'
import { verdicts } from '../diff/types'
import { carries, weights } from '../settings/types'
import { blockings, fits, motionItemKinds, replacedParts, swapStates, unfitCodes } from '../swap/types'
import { axisRef, idSchema, instantSchema, passwordSchema, reasonSchema, serialSchema } from './common'
import { unitStates } from './places'
import { changeSchema, contentSchema, meanings, unitOfFile, versionSchema, waivableCheck } from './versions'

/*
 * The swap: from a dead unit to a released one. Every step is answered by the whole swap as it stands then.
 *
 * Two devices: each body may carry `rev`, the swap's rev that the sender read (a file has it in the query). A stale one is
 * refused with 409 `edited-meanwhile`; `current` of the problem is the swap, and entries of its log with a greater rev are what
 * the other device did. Without rev nothing is compared, and the order of steps still holds.
 *
 *   GET  /api/swaps?open=&axis=    a page of swapLine, newest first (the last five: limit=5)
 *   POST /api/swaps                201
 *   GET  /api/swaps/:id            the swap;  /spares  sparesAnswer;  /kit  swapKitAnswer
 *   POST /api/swaps/:id/source /unit-in /cautions /ticks /safe /read-back /missing-keys /first-motion /note /running /abandon /put-back
 *   POST /api/swaps/:id/release    signed, planner
 *
 * Problem codes beside the usual ones, all 409 where nothing else is said:
 *   swap-open            the axis has an open swap; `current` = { id, step }
 *   swap-closed          released or abandoned already
 *   step-missing         `missing` names the steps that come first
 *   already-safe         another unit after /safe: put the old one back first, or abandon
 *   forces-unconfirmed   kit or safe before the rescaled percentages are confirmed
 *   cautions-unread      kit before anybody acknowledged the cautions of this swap
 *   unfit                kit or safe with a unit that does not fit; `errors` has the reasons
 *   fitted               the unit sits at another axis; says which
 *   same-unit            the unit that was taken out; putting it back is another button
 *   other-unit           only the actuator is changed, and another serial is named
 *   already-back         the old unit is back already
 *   serial-unknown       422: a new serial needs its model
 *   read-back-serial     the file is of another unit; `attempt` is kept and `current` is the swap
 *   read-back-model      the file is of another model; kept likewise
 *   read-back-twice      the very file of an attempt before; kept likewise
 *   settings-unreadable  422: kept likewise, with its errors
 *   taught-missing       first motion while a value to be taught was not read back; `errors` names them
 *   motion-fault         running while an item of the first motion stands at fault
 *   read-back-differs    release while the last read-back differs and its version is not known-good
 *   four-eyes            403: release by who sent the last read-back
 */

const text = (most: number) => z.string().max(most)
const rev = { rev: z.int().min(1).optional().describe('the rev that was read; 409 edited-meanwhile when stale') }

export const swapOpenBody = z.strictObject({
  axisId: idSchema, replaced: z.enum(replacedParts), failure: reasonSchema.describe('what failed, in words'), workOrder: text(80).optional(),
  unitOut: z.strictObject({ serial: serialSchema, channel: z.int().min(1).max(64).optional(), model: z.string().min(1).max(64).optional() }).optional()
    .describe('the serial on the plate, where the vault believes another unit is fitted; model where it is not registered'),
})
export const swapSourceBody = z.strictObject({
  ...rev, versionId: idSchema.describe('the known-good in force, or an as-found version of this swap'), decidedBy: z.string().min(1).max(80), reason: reasonSchema,
}).describe('which version goes to the new unit, until /safe')
export const unitInBody = z.strictObject({
  ...rev, serial: serialSchema, channel: z.int().min(1).max(64).optional(), model: z.string().min(1).max(64).optional().describe('needed for a serial that is not registered'),
  firmware: text(32).optional(), actuatorSerial: text(64).optional(), actuatorModel: text(64).optional(),
  forcesConfirmed: z.boolean().optional().describe('the rescaled percentages were read in newtons and are right'),
  unfit: z.strictObject({ by: z.string().min(1).max(80).describe('the planner who allows it'), at: instantSchema, reason: reasonSchema }).optional(),
})
export const cautionsBody = z.strictObject({ ...rev, read: z.literal(true) })
export const safeBody = z.strictObject({ ...rev, confirmed: z.literal(true), blocked: z.enum(blockings).optional().describe('needed where a load can fall') })
/** Beside the file: in the query of a raw body, or as fields of a multipart one. */
export const readBackQuery = z.strictObject({
  rev: z.coerce.number().int().min(1).optional(), capturedAt: instantSchema.optional(), decimal: z.enum(['point', 'comma']).optional(),
  layout: z.string().min(1).max(64).optional(), firmware: text(32).optional(), name: text(255).optional(),
})
export const missingKeysBody = z.strictObject({
  ...rev, keys: z.array(z.string().min(1).max(80)).min(1).max(200), reason: reasonSchema,
  allowedBy: z.string().min(1).max(80).optional().describe('the planner who allows it; needed where a key weighs harm and the sender is no planner'),
}).describe('this firmware has no place for them: holds for every unit of the model and firmware')
export const firstMotionBody = z.strictObject({
  ...rev, speedPercent: z.number().positive().max(100),
  results: z.array(z.strictObject({ item: z.string().min(1).max(40), outcome: z.enum(['ok', 'fault']), text: text(400).optional() })).min(1).max(1100),
}).describe('any number of items at a time; each is kept, the newest result of an item holds')
/** What is ticked between two steps, one a call, so that another device goes on from it. */
export const ticksBody = z.discriminatedUnion('tick', [
  z.strictObject({ ...rev, tick: z.literal('kit').describe('the kit for the unit in is in hand') }),
  z.strictObject({ ...rev, tick: z.literal('line'), line: z.string().min(1).max(100).describe('one thing to write, by a name of its own'), words: z.string().min(1).max(200).describe('as it stood on the page'), done: z.boolean().describe('false takes the tick back') }),
  z.strictObject({ ...rev, tick: z.literal('written').describe('all of it is written: to the read-back') }),
  z.strictObject({ ...rev, tick: z.literal('verdict').describe('a verdict was read: to first motion'), attempt: z.int().min(1) }),
  z.strictObject({ ...rev, tick: z.literal('motion').describe('the first motion is left as it stands: to running') }),
])
export type SwapTick = z.infer<typeof ticksBody>
export const noteBody = z.strictObject({ ...rev, note: text(2000) }).describe('the hand-over note as far as it is written; /running hands it over')
export const runningBody = z.strictObject({ ...rev, note: text(2000).optional().describe('for who comes by day') })
export const releaseBody = z.strictObject({
  ...rev, meaning: z.enum(meanings), note: text(2000).optional(), oldUnitState: z.enum(['repair', 'scrapped', 'spare']).optional().describe('absent: stays as it is'), password: passwordSchema,
})
export const abandonBody = z.strictObject({ ...rev, reason: reasonSchema, fittedUnitId: idSchema.nullable().describe('which unit is truly fitted now; null = none') })
export const putBackBody = z.strictObject({ ...rev, reason: reasonSchema, unitState: z.enum(['spare', 'failed', 'repair', 'scrapped']).optional().describe('of the unit that comes out again; absent = spare') })

export const swapUnit = z.object({
  id: idSchema, serial: z.string(), channel: z.int().nullable(), model: z.string(), firmware: z.string().nullable(), actuatorSerial: z.string().nullable(),
  actuatorModel: z.string().nullable(), location: z.string(), state: z.enum(unitStates), modelKnown: z.boolean(),
})
export type SwapUnit = z.infer<typeof swapUnit>
export const unfitReason = z.object({ code: z.enum(unfitCodes), hard: z.boolean(), message: z.string(), at: z.array(z.string()) })
export const adjustmentSchema = z.object({
  at: z.string(), section: z.enum(['setup', 'move']), row: z.int().optional(), field: z.string(), before: z.number(), after: z.number(), unit: z.string(),
  newtonsBefore: z.number().nullable().describe('N, rotary N·m; null for a value that is no force'), newtonsAfter: z.number().nullable(), why: z.string(),
})
const versionLine = z.object({ versionId: idSchema, number: z.int(), capturedAt: instantSchema, scribeCode: z.string(), serial: z.string() })
export const tolerated = changeSchema.extend({ tolerance: z.number().optional() })
export const missingKey = z.object({ key: z.string(), weight: z.enum(weights), accepted: z.boolean() })

export const readBackProblems = ['serial', 'model', 'unreadable', 'twice'] as const
/** One attempt: compared, or turned away and kept all the same. */
export const readBackSchema = z.object({
  attempt: z.int(), at: instantSchema, by: z.string(), byId: idSchema, file: z.string().nullable(), sha256: z.string(),
  afterFirstMotion: z.boolean(), problem: z.enum(readBackProblems).nullable(), detail: z.string().nullable().describe('what was wrong, for those turned away'),
  version: z.object({ id: idSchema, number: z.int() }).nullable(), compare: z.enum(verdicts).nullable(),
  differences: z.array(tolerated).describe('before = the kit, after = the unit; "write again" beside each'), within: z.int().describe('values that differ within the tolerance'),
  aside: z.array(changeSchema), missingKeys: z.array(missingKey), rowsMissing: z.array(z.object({ section: z.enum(['zone', 'move']), row: z.int() })),
  scribeCode: z.string().nullable().describe('over the kit’s keys, the kit’s value within tolerance; equal to the kit’s exactly for identical and same'),
})
export type ReadBack = z.infer<typeof readBackSchema>

const done = z.object({ by: z.string(), at: instantSchema })
export const swapSchema = z.object({
  id: idSchema, axisId: idSchema, tag: z.string(), machine: z.string(), line: z.string(), site: z.string(), timeZone: z.string(),
  rev: z.int(), step: z.enum(swapStates), replaced: z.enum(replacedParts), failure: z.string(), workOrder: z.string().nullable(),
  openedAt: instantSchema, openedBy: z.string(),
  unitOut: swapUnit.nullable(), unitIn: swapUnit.nullable(), putBack: z.boolean().describe('the old unit is the unit in'),
  loadCanFall: z.boolean().describe('gravity is flagged, or the axis is not level: blocked how must be said'),
  fit: z.enum(fits).nullable(), reasons: z.array(unfitReason), unfit: z.object({ by: z.string(), at: instantSchema, reason: z.string(), enteredBy: z.string() }).nullable(),
  adjustments: z.array(adjustmentSchema), forcesConfirmed: z.object({ by: z.string(), at: instantSchema }).nullable(), checks: z.array(waivableCheck),
  versionId: idSchema.nullable().describe('what goes to the new unit'),
  source: versionLine.extend({ released: z.boolean(), mark: z.object({ by: z.string(), at: instantSchema }).nullable(), chosen: z.object({ decidedBy: z.string(), reason: z.string() }).nullable() }).nullable(),
  asFound: versionLine.extend({ compare: z.enum(verdicts).nullable().describe('against the known-good') }).nullable(),
  kit: z.object({
    scribeCode: z.string().describe('what the read-back must show'), values: z.int(), moves: z.int(), teach: z.array(z.string()), prove: z.array(z.string()),
    attachmentFits: z.boolean().describe('both units have one force base: a drive tool’s own file means the same newtons'),
  }).nullable(),
  cautions: z.object({ by: z.string(), at: instantSchema }).nullable(),
  safe: z.object({ by: z.string(), at: instantSchema, blocked: z.enum(blockings).nullable() }).nullable(),
  readBacks: z.array(readBackSchema).describe('oldest first'),
  firstMotion: z.object({
    speedPercent: z.number(), results: z.array(z.object({ item: z.string(), outcome: z.enum(['ok', 'fault']), text: z.string().nullable(), by: z.string(), at: instantSchema })).describe('each as it was given, oldest first; the newest of an item holds'),
    untried: z.array(z.string()),
  }).nullable(),
  ticks: z.object({
    kit: done.nullable(), lines: z.array(done.extend({ line: z.string(), words: z.string() })), written: done.nullable(),
    verdict: done.extend({ attempt: z.int() }).nullable(), motion: done.nullable(),
  }).describe('what was ticked for the unit in, on whichever device'),
  draft: done.extend({ note: z.string() }).nullable().describe('the hand-over note that was not handed over yet'),
  taughtMissing: z.array(z.string()).describe('to be taught, and not in the last read-back: first motion is not offered'),
  running: z.object({ by: z.string(), at: instantSchema, note: z.string().nullable() }).nullable(),
  asLeft: z.object({ versionId: idSchema, number: z.int(), compare: z.enum(verdicts) }).nullable().describe('the last read-back after first motion; without one nothing carries over'),
  releaseDueAt: instantSchema.nullable().describe('running longer than this without release is on the board'),
  released: z.object({ by: z.string(), at: instantSchema, meaning: z.enum(meanings), note: z.string().nullable(), carriedOver: z.boolean(), oldUnitState: z.enum(unitStates).nullable() }).nullable(),
  abandoned: z.object({ by: z.string(), at: instantSchema, reason: z.string() }).nullable(),
  log: z.array(z.object({ rev: z.int(), at: instantSchema, by: z.string(), act: z.string(), text: z.string() })).describe('oldest first'),
})
export type Swap = z.infer<typeof swapSchema>
/** Answer of /read-back: the swap, and the attempt of this file beside it. */
export const readBackAnswer = swapSchema.extend({
  attempt: z.int(), version: versionSchema, compare: z.enum(verdicts), differences: z.array(tolerated), aside: z.array(changeSchema), missingKeys: z.array(missingKey),
})
export type ReadBackAnswer = z.infer<typeof readBackAnswer>

export const swapQuery = z.strictObject({
  limit: z.coerce.number().int().min(1).max(200).optional(), cursor: z.string().max(200).optional(),
  open: z.enum(['true', 'false']).optional(), axis: axisRef.optional(),
})
/** A line of the list, newest first. */
export const swapLine = z.object({
  id: idSchema, axisId: idSchema, tag: z.string(), machine: z.string(), timeZone: z.string(), step: z.enum(swapStates), replaced: z.enum(replacedParts), failure: z.string(),
  openedAt: instantSchema, openedBy: z.string(), changedAt: instantSchema, serialOut: z.string().nullable(), serialIn: z.string().nullable(),
  runningSince: instantSchema.nullable(), releaseDueAt: instantSchema.nullable(), overdue: z.boolean(),
})
export type SwapLine = z.infer<typeof swapLine>

export const motionItemSchema = z.object({
  item: z.string(), kind: z.enum(motionItemKinds), words: z.string(), moves: z.array(z.int()), endless: z.boolean(), direction: z.enum(['positive', 'negative', 'either']).nullable(),
  end: z.number().nullable(), seconds: z.number().nullable(), atLeast: z.boolean(), inputs: z.array(z.int()).nullable(),
})
export const swapKitQuery = z.strictObject({ speedPercent: z.coerce.number().positive().max(100).optional().describe('reduced speed of the first motion; absent = 10') })
/** What is written into the new unit, to be shown and kept on the page while there is no network. */
export const swapKitAnswer = z.object({
  content: contentSchema, unit: unitOfFile.describe('serial TO-BE-WRITTEN before there is a unit in'), scribeCode: z.string(),
  carried: z.array(z.object({ section: z.enum(['setup', 'zone', 'move', 'extra']), field: z.string().optional(), carry: z.enum(carries), why: z.string() })),
  teach: z.array(z.string()), prove: z.array(z.string()), firstMotion: z.array(motionItemSchema), speedPercent: z.number(),
})
export type SwapKit = z.infer<typeof swapKitAnswer>
/** Spares in stock for the swap, those that fit first, the likest and nearest first among them. */
export const sparesAnswer = z.object({
  items: z.array(z.object({ unit: swapUnit, fit: z.enum(fits), hard: z.boolean(), reasons: z.array(unfitReason), adjusted: z.int(), sameModel: z.boolean(), sameFirmware: z.boolean() })),
})
export type SwapSpares = z.infer<typeof sparesAnswer>
