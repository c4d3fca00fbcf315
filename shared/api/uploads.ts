import { z } from 'zod'
import { nameplateSchema } from '../settings/nameplate'
import { axisFlags, axisKinds } from '../settings/types'
import { axisRef, idSchema, instantSchema, problemErrorSchema, reasonSchema, serialSchema } from './common'
import { findingStates } from './findings'
import { dutySchema } from './places'
import { changeSchema, contentSchema, judgedSchema, occasions, renumberingSchema, versionSchema, waivableCheck } from './versions'
import { waiverSchema } from './waivers'

/** What stands beside the file: in the query of a raw body, or as fields of a multipart one. An empty value is the same as none. */
export const uploadFields = z.strictObject({
  occasion: z.enum(occasions).exclude(['read-back']).optional(),
  reason: z.string().max(2000).optional(), workOrder: z.string().max(80).optional(),
  changedBy: z.string().max(80).optional().describe('free text, or person:ID'), allowedBy: z.string().max(80).optional().describe('free text, or person:ID'),
  together: z.enum(['yes', 'no']).optional().describe('yes: reason and work order were given for many files at once, and explain no finding'),
  capturedAt: instantSchema.optional(), axis: axisRef.optional(), decimal: z.enum(['point', 'comma']).optional(),
  layout: z.string().min(1).max(64).optional().describe('model whose entry table the file is laid out by; absent = the neutral form'),
  serial: serialSchema.optional().describe('with layout: of the unit, where the file does not hold it'),
  firmware: z.string().max(32).optional().describe('with layout: of the unit, where the file does not hold it'),
  name: z.string().max(255).optional().describe('file name'),
})
export type UploadFields = z.infer<typeof uploadFields>

export const normalisedSchema = z.object({
  form: z.enum(['json', 'csv']), rounded: z.int(), converted: z.int(), encoding: z.string(), decodedTexts: z.array(z.string()),
  delimiter: z.string().optional(), decimal: z.string().optional(),
})
/** 201: a new version. */
export const uploadStored = z.object({
  version: versionSchema, changes: z.array(changeSchema), renumbered: z.array(renumberingSchema), checks: z.array(waivableCheck), judged: judgedSchema,
  findings: z.array(z.object({ id: idSchema, state: z.enum(findingStates) })), normalised: normalisedSchema,
})
export type UploadStored = z.infer<typeof uploadStored>
/** 200: the axis' current content, seen again. */
export const uploadSeen = z.object({ sighting: z.object({ id: idSchema, at: instantSchema }), version: versionSchema })
export type UploadSeen = z.infer<typeof uploadSeen>
export const trayProblems = ['serial-unknown', 'not-fitted', 'axis-kind', 'unreadable'] as const
/** 202: kept in the tray, because it has no axis. */
export const uploadTray = z.object({ tray: idSchema, problem: z.enum(trayProblems), detail: z.string() })

export const previewAnswer = z.discriminatedUnion('outcome', [
  z.object({ outcome: z.literal('version'), axis: z.object({ id: idSchema, tag: z.string() }), number: z.int(), late: z.boolean(), clockDoubtful: z.boolean(), changes: z.array(changeSchema), renumbered: z.array(renumberingSchema), checks: z.array(waivableCheck), normalised: normalisedSchema }),
  z.object({ outcome: z.literal('sighting'), axis: z.object({ id: idSchema, tag: z.string() }), number: z.int() }),
  z.object({ outcome: z.literal('tray'), problem: z.enum(trayProblems), detail: z.string() }),
])

/** What the upload page needs to read a file against, before anything is sent. */
export const judgingQuery = z.strictObject({ serial: z.string().min(1).max(64), channel: z.coerce.number().int().positive().optional(), capturedAt: instantSchema.optional() })
export const judgingContext = z.object({
  /** null: the serial is not registered, or the unit is not fitted. */
  problem: z.enum(['serial-unknown', 'not-fitted']).nullable(),
  registered: z.object({ model: z.string(), serial: z.string() }).nullable(),
  axis: z.object({ id: idSchema, tag: z.string(), role: z.string(), axisKind: z.enum(axisKinds), flags: z.array(z.enum(axisFlags)), watched: z.array(z.string()), duty: dutySchema.nullable(), controllerScanMs: z.number().nullable() }).nullable(),
  current: z.object({ versionId: idSchema, number: z.int(), contentHash: z.string(), content: contentSchema, capturedAt: instantSchema, sightings: z.int() }).nullable(),
  knownGood: z.object({ versionId: idSchema, number: z.int(), firmware: z.string().nullable(), content: contentSchema }).nullable(),
  /** What the axis held on the unit before, where that is of another model. */
  broughtFrom: z.object({ content: contentSchema, forceBase: z.number().nullable(), rescaled: z.boolean() }).nullable(),
  /** Those that nobody took back, that which holds longest first. */
  waivers: z.array(waiverSchema),
  nextNumber: z.int(),
  nameplate: nameplateSchema.nullable(),
  rules: z.array(z.object({ id: idSchema, scope: z.enum(['site', 'machine', 'axis']), field: z.string(), min: z.number().optional(), max: z.number().optional(), fixed: z.union([z.number(), z.string(), z.boolean()]).optional(), reason: z.string() })),
})
export type JudgingContext = z.infer<typeof judgingContext>

export const trayItem = z.object({
  id: idSchema, problem: z.enum(trayProblems), detail: z.string(), errors: z.array(problemErrorSchema), more: z.int(),
  name: z.string().nullable(), bytes: z.int(), sha256: z.string(), receivedAt: instantSchema, sentBy: z.string(),
  serial: z.string().nullable(), model: z.string().nullable(), capturedAt: instantSchema.nullable(), siteId: idSchema.nullable(),
  /** How many files of equal content and serial this line stands for. */
  copies: z.int(),
  /** Where it probably belongs: same address, or at least 95 % equal content. */
  guess: z.object({ axisId: idSchema, tag: z.string(), why: z.string() }).nullable(),
})
export type TrayItem = z.infer<typeof trayItem>
export const trayAssignBody = z.strictObject({ axisId: idSchema, at: instantSchema.optional().describe('since when the unit sits there'), reason: z.string().max(2000).optional() })
export const trayDiscardBody = z.strictObject({ reason: reasonSchema })
export const trayAssigned = z.union([z.object({ version: versionSchema }), z.object({ sighting: z.object({ id: idSchema, at: instantSchema }), version: versionSchema })])
