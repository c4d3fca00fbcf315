import { z } from 'zod'
import { levels } from '../checks/types'
import { sections, verdicts } from '../diff/types'
import { axisFlags, axisKinds, weights } from '../settings/types'
import { papers } from './places'
import { openSwapSchema } from './open-swap'
import { readinessSchema } from './readiness'
import { axisRef, idSchema, idText, instantSchema, passwordSchema, reasonSchema } from './common'

export const occasions = ['commissioning', 'routine', 'as-found', 'as-left', 'read-back'] as const
export type Occasion = (typeof occasions)[number]

export const extraValue = z.union([z.number(), z.boolean(), z.string(), z.object({ value: z.number(), unit: z.string() })])
/** The canonical content as settings-format has it; a stored content is never re-validated on the way out. */
export const contentSchema = z.object({
  axisKind: z.enum(axisKinds), extra: z.record(z.string(), extraValue), moves: z.array(z.record(z.string(), z.union([z.number(), z.string()]))),
  setup: z.record(z.string(), z.union([z.number(), z.boolean(), z.string()])), zones: z.array(z.object({ zone: z.int(), from: z.number(), to: z.number() })),
})

export const changeSchema = z.object({
  at: z.string(), section: z.enum(sections), row: z.int().optional(), field: z.string(), before: extraValue.optional(), after: extraValue.optional(),
  unit: z.string().optional(), delta: z.number().optional(), percent: z.number().optional(), points: z.number().optional(),
  weight: z.enum(weights), watched: z.boolean(), affects: z.array(z.int()).optional(),
})
export const renumberingSchema = z.object({ first: z.int(), last: z.int(), by: z.int(), sure: z.boolean() })
export const checkSchema = z.object({
  rule: z.string(), level: z.enum(levels), at: z.array(z.string()), message: z.string(),
  values: z.record(z.string(), z.union([z.number(), z.string(), z.array(z.number()), z.array(z.string())])), missing: z.array(z.string()).optional(),
})
/** Who took a stop, or what could not be judged, upon himself, until when and why. */
const waivedSchema = z.object({ id: idSchema, by: z.string(), givenAt: instantSchema, until: instantSchema, reason: z.string() })
/** As the check of a stored version is shown: `waived` where the axis has a waiver that covers it and holds now. */
export const waivableCheck = checkSchema.extend({ waived: waivedSchema.nullable() })
export const judgedSchema = z.object({
  ruleSet: z.string(), nameplateRevision: z.int().nullable(), judgedAt: instantSchema, judged: z.array(z.string()), notApplicable: z.array(z.string()),
})

export const weightCounts = z.object({ harm: z.int(), motion: z.int(), text: z.int() })
export const levelCounts = z.object({ stop: z.int(), warn: z.int(), note: z.int(), unknown: z.int() })

export const versionSchema = z.object({
  id: idSchema, axisId: idSchema, axisTag: z.string(), unitId: idSchema, serial: z.string(), number: z.int(), occasion: z.enum(occasions),
  capturedAt: instantSchema, receivedAt: instantSchema, clockDoubtful: z.boolean(), late: z.boolean(), current: z.boolean(),
  void: z.object({ at: instantSchema, by: z.string(), reason: z.string() }).nullable(),
  baseId: idSchema.nullable(), baseNumber: z.int().nullable(), contentHash: z.string(), copyHash: z.string(), scribeCode: z.string(),
  storedBy: z.string(), changedBy: z.string().nullable(), allowedBy: z.string().nullable(), reason: z.string().nullable(), workOrder: z.string().nullable(),
  firmware: z.string().nullable(), model: z.string(), changes: weightCounts, checks: levelCounts,
  sightings: z.int(), lastSeenAt: instantSchema.nullable(),
  mark: z.object({ by: z.string(), at: instantSchema, meaning: z.string(), note: z.string().nullable(), inForce: z.boolean() }).nullable(),
})
export type VersionSummary = z.infer<typeof versionSchema>
export const unitOfFile = z.object({
  serial: z.string(), channel: z.int().optional(), model: z.string(), firmware: z.string().optional(), actuatorSerial: z.string().optional(), actuatorModel: z.string().optional(),
})
/** GET one: the summary, and all of it. */
export const versionOne = versionSchema.omit({ changes: true, checks: true }).extend({
  changeCounts: weightCounts, checkCounts: levelCounts, content: contentSchema, checks: z.array(waivableCheck), judged: judgedSchema, unit: unitOfFile,
  exportedAt: z.string(), exportedBy: z.string().nullable(), note: z.string().nullable(), readings: z.record(z.string(), extraValue),
  upload: z.object({ name: z.string().nullable(), bytes: z.int(), sha256: z.string(), form: z.enum(['json', 'csv']) }),
  normalised: z.object({ rounded: z.int(), converted: z.int(), encoding: z.string(), delimiter: z.string().optional(), decimal: z.string().optional() }),
})
export type VersionOne = z.infer<typeof versionOne>

export const fileQuery = z.strictObject({ form: z.enum(['json', 'csv', 'entry', 'original']) })
export const changesQuery = z.strictObject({ against: idText, form: z.enum(['json-patch', 'text']).optional() })
export const changesAnswer = z.object({
  compare: z.enum(verdicts), changes: z.array(changeSchema), renumbered: z.array(renumberingSchema),
  /** Told by what rows do; absent where the flat reading says no more. */
  told: z.object({ pairs: z.array(z.object({ before: z.int().optional(), after: z.int().optional() })), changes: z.array(changeSchema) }).optional(),
})
export type ChangesAnswer = z.infer<typeof changesAnswer>

export const meanings = ['reviewed', 'approved', 'responsibility'] as const
export const knownGoodBody = z.strictObject({ meaning: z.enum(meanings), note: z.string().max(2000).optional(), password: passwordSchema })
export const voidBody = z.strictObject({ reason: reasonSchema, password: passwordSchema })
/** `entry`: the drive's own list, by the entry table of the model that the kit is for; `pdf`: the restore sheet; `zip`: all of them, with the drive tool's own backup. */
export const kitForms = ['json', 'csv', 'entry', 'pdf', 'zip'] as const
export const kitBody = z.strictObject({ serial: z.string().max(64).optional(), form: z.enum(kitForms), paper: z.enum(papers).optional().describe('of the sheet; the site’s where it is not said'), cautionsRead: z.boolean() })

export const axisStatuses = ['in-line', 'off', 'never-read', 'unmarked'] as const
export const axisSchema = z.object({
  id: idSchema, rev: z.int(), tag: z.string(), axisKind: z.enum(axisKinds), role: z.string(), flags: z.array(z.enum(axisFlags)), bus: z.string(),
  uploadEveryHours: z.int().nullable(), duty: z.object({ moves: z.array(z.int()), cycleTime: z.number() }).nullable(),
  machine: z.object({ id: idSchema, name: z.string() }), line: z.object({ id: idSchema, name: z.string() }), site: z.object({ id: idSchema, name: z.string(), timeZone: z.string() }),
  status: z.enum(axisStatuses),
  /** Against the known-good in force. */
  off: weightCounts, /** Sense of the heaviest numeric change against known-good. */ sense: z.enum(['more', 'less']).nullable(),
  knownGood: z.object({ versionId: idSchema, number: z.int(), by: z.string(), at: instantSchema, scribeCode: z.string() }).nullable(),
  unit: z.object({ id: idSchema, serial: z.string(), channel: z.int().nullable(), model: z.string(), firmware: z.string().nullable(), since: instantSchema }).nullable(),
  current: z.object({ versionId: idSchema, number: z.int(), capturedAt: instantSchema, scribeCode: z.string(), firmware: z.string().nullable() }).nullable(),
  lastUploadAt: instantSchema.nullable(), overdueSince: instantSchema.nullable(), checks: levelCounts,
  /** Whether it could be restored tonight, and why not. */
  readiness: readinessSchema,
  swap: openSwapSchema.nullable().describe('open at this axis; there is one at most'),
  versions: z.int(), sightings: z.int(),
})
export type Axis = z.infer<typeof axisSchema>

/** One event on the time line, newest first. */
export const lifeEvent = z.object({
  at: instantSchema, kind: z.enum(['version', 'mark', 'mark-none', 'void', 'fitted', 'taken-out', 'finding', 'finding-closed', 'swap']),
  /** Of a finding: its id. */
  findingId: idSchema.nullable(),
  versionId: idSchema.nullable(), number: z.int().nullable(), by: z.string(), text: z.string().nullable(),
  serial: z.string().nullable(), changes: weightCounts.nullable(), occasion: z.enum(occasions).nullable(), sightings: z.int().nullable(),
})
export type LifeEvent = z.infer<typeof lifeEvent>
export const asOfQuery = z.strictObject({ at: instantSchema })
export const versionRef = z.strictObject({ id: axisRef, number: idText })
