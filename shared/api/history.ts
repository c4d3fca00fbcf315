import { z } from 'zod'
import { sections } from '../diff/types'
import { weights } from '../settings/types'
import { findingStates } from './findings'
import { axisRef, idSchema, idText, instantSchema, listQuery, pageOf } from './common'
import { axisStatuses, extraValue, occasions } from './versions'

/** From including, to not including, by when the vault received it: its own order, which no clock of a drive can bend. */
const stretch = { from: instantSchema.optional(), to: instantSchema.optional() }
const place = { axis: axisRef.optional(), machine: idText.optional(), line: idText.optional(), site: idText.optional() }
const by = z.string().min(1).max(80).optional().describe('who changed or stored it: a name, person:ID, or nobody')

export const historyForms = ['json', 'csv', 'pdf'] as const
export const historyQuery = listQuery.extend({
  field: z.string().min(1).max(80).optional().describe('thrustLimit, move.target, extra:K-017, or a family: force-limits, limits, targets …'),
  section: z.enum(sections).optional(), row: z.coerce.number().int().min(0).max(65535).optional(),
  ...place, unit: idText.optional(), ...stretch, by, weight: z.enum(weights).optional(), form: z.enum(historyForms).optional(),
})
export type HistoryQuery = z.output<typeof historyQuery>

/** One value that changed, with who, when, why and who allowed it; `before` and `after` null = not set. */
export const historyItem = z.object({
  versionId: idSchema, axisId: idSchema, tag: z.string(), section: z.enum(sections), row: z.int().nullable(), field: z.string(),
  before: extraValue.nullable(), after: extraValue.nullable(), unit: z.string().nullable(), delta: z.number().nullable(), points: z.number().nullable(), weight: z.enum(weights),
  at: instantSchema.describe('when the vault received it'), capturedAt: instantSchema,
  changedBy: z.string().nullable(), storedBy: z.string(), reason: z.string().nullable(), workOrder: z.string().nullable(), allowedBy: z.string().nullable(),
  findingId: idSchema.nullable(),
  number: z.int(), baseId: idSchema.nullable(), baseNumber: z.int().nullable(), baseAt: instantSchema.nullable().describe('when the version before was captured: the change was made after that'),
  seq: z.int().describe('place among the changes of its version'), timeZone: z.string(), serial: z.string(), occasion: z.enum(occasions), late: z.boolean(), void: z.boolean(),
  newtons: z.object({ before: z.string().nullable(), after: z.string().nullable() }).nullable().describe('the force that a percentage means by the nameplate of then, 243.2 N; null where it is no force, or nobody knows'),
  /** Of the finding: where it stands, and what was said last. */
  findingState: z.enum(findingStates).nullable(), explanation: z.string().nullable(), explainedBy: z.string().nullable(),
})
export type HistoryItem = z.infer<typeof historyItem>
export const historyPage = pageOf(historyItem).extend({ rests: z.string().optional().describe('what the answer rests on; with form=json') })
/** What an answer rests on: a change that nobody read is in none. */
export const historyRests = z.object({
  versions: z.int(), notRead: z.int().describe('axes that no file came from in the time, counted up to 200'), notReadMore: z.boolean(), tags: z.array(z.string()).describe('the first five of them'),
  verified: z.object({ at: instantSchema, entries: z.int(), outcome: z.enum(['sound', 'damage', 'failed']) }).nullable(), size: z.int().describe('entries of the log now'), says: z.string().describe('all of it in one sentence'),
})
export type HistoryRests = z.infer<typeof historyRests>

export const historyKinds = ['settings', 'places', 'nameplates', 'rules', 'people', 'marks'] as const
export type HistoryKind = (typeof historyKinds)[number]
export const actsQuery = listQuery.extend({ kind: z.enum(historyKinds), ...stretch })
/** One act beside the settings of axes, from the log: what its subject was, and what it became. */
export const historyAct = z.object({
  seq: z.int(), at: instantSchema, by: z.string(), act: z.string(), subject: z.string(),
  changes: z.array(z.object({ field: z.string(), before: z.unknown().optional(), after: z.unknown().optional() })).describe('before absent: was not set; after absent: is not set'), note: z.string().nullable(),
})
export type HistoryAct = z.infer<typeof historyAct>
export const actsPage = pageOf(historyAct)

export const notReadQuery = listQuery.extend({ ...place, ...stretch })
/** As that, and no page of it: the answer is one. */
export const restsQuery = notReadQuery.omit({ limit: true, cursor: true })
/** An axis that no file came from in a stretch of time. */
export const notReadAxis = z.object({
  axisId: idSchema, tag: z.string(), machine: z.string(), line: z.string(), site: z.string(), timeZone: z.string(), status: z.enum(axisStatuses),
  uploadEveryHours: z.int().nullable(), lastUploadAt: instantSchema.nullable(),
})
export type NotReadAxis = z.infer<typeof notReadAxis>
export const notReadPage = pageOf(notReadAxis)
