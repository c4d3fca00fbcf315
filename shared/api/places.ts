import { z } from 'zod'
import { axisFlags, axisKinds } from '../settings/types'
import { dictionaryEntrySchema, nameplateSchema } from '../settings/nameplate'
import { idSchema, idText, instantSchema, nameSchema, reasonSchema, serialSchema, tagSchema } from './common'

const rev = { rev: z.int().optional().describe('the rev that was read; 428 without, 409 edited-meanwhile when stale') }
const text = (most: number) => z.string().max(most)

/** Sizes of a restore sheet. */
export const papers = ['A4', 'Letter'] as const
export const siteBody = z.strictObject({ name: nameSchema, timeZone: z.string().min(1).max(64).describe('IANA name') })
export const sitePatch = z.strictObject({
  ...rev, name: nameSchema.optional(), timeZone: z.string().min(1).max(64).optional(),
  fourEyes: z.boolean().optional(), releaseHours: z.int().min(1).max(720).optional(), knownGoodMonths: z.int().min(1).max(120).optional(),
  watched: z.array(z.string().max(80)).max(200).optional().describe('field names watched besides the usual ones'),
  attachmentWanted: z.boolean().optional().describe('ready only with the drive tool’s own backup attached to the known-good version'),
  labelWanted: z.boolean().optional().describe('ready only with a printed label'), paper: z.enum(papers).optional().describe('of restore sheets'),
})
export const siteSchema = z.object({
  id: idSchema, rev: z.int(), name: z.string(), timeZone: z.string(), fourEyes: z.boolean(), releaseHours: z.int(),
  knownGoodMonths: z.int(), watched: z.array(z.string()), attachmentWanted: z.boolean(), labelWanted: z.boolean(), paper: z.enum(papers),
})
export type Site = z.infer<typeof siteSchema>

export const lineBody = z.strictObject({ siteId: idSchema, name: nameSchema })
export const linePatch = z.strictObject({ ...rev, name: nameSchema.optional(), siteId: idSchema.optional() })
export const lineSchema = z.object({ id: idSchema, rev: z.int(), siteId: idSchema, name: z.string() })
export type Line = z.infer<typeof lineSchema>

const controllerScanMs = z.number().positive().max(60_000).nullable().describe('how often its controller looks at the drives and sets their inputs, in ms; null = not known')
export const machineBody = z.strictObject({ lineId: idSchema, name: nameSchema, controllerScanMs: controllerScanMs.optional() })
export const machinePatch = z.strictObject({ ...rev, name: nameSchema.optional(), lineId: idSchema.optional(), controllerScanMs: controllerScanMs.optional() })
export const machineSchema = z.object({ id: idSchema, rev: z.int(), lineId: idSchema, name: z.string(), controllerScanMs })
export type Machine = z.infer<typeof machineSchema>

export const dutySchema = z.strictObject({ moves: z.array(z.int().min(0).max(1023)).min(1).max(256), cycleTime: z.number().positive().describe('ms') })
const axisFields = {
  machineId: idSchema, tag: tagSchema, axisKind: z.enum(axisKinds),
  role: text(80).optional(), flags: z.array(z.enum(axisFlags)).max(3).optional(), bus: text(80).optional(),
  uploadEveryHours: z.int().min(1).max(8760).nullable().optional().describe('how often an upload is due; null = never'),
  duty: dutySchema.nullable().optional(),
}
export const axisBody = z.strictObject(axisFields)
export const axisPatch = z.strictObject({
  ...rev, machineId: idSchema.optional(), tag: tagSchema.optional(), role: axisFields.role, flags: axisFields.flags, bus: axisFields.bus,
  uploadEveryHours: axisFields.uploadEveryHours, duty: axisFields.duty,
})

export const unitStates = ['spare', 'fitted', 'failed', 'repair', 'scrapped'] as const
const unitFields = {
  serial: serialSchema, channel: z.int().min(1).max(64).optional(), model: z.string().min(1).max(64), firmware: text(32).optional(),
  actuatorSerial: text(64).optional(), actuatorModel: text(64).optional(), location: text(200).optional(), state: z.enum(unitStates).optional(),
  siteId: idSchema.optional().describe('where it lies'),
}
export const unitBody = z.strictObject(unitFields)
export const unitPatch = z.strictObject({
  ...rev, model: unitFields.model.optional(), firmware: unitFields.firmware, actuatorSerial: unitFields.actuatorSerial,
  actuatorModel: unitFields.actuatorModel, location: unitFields.location, state: unitFields.state, siteId: unitFields.siteId.nullable(),
})
export const unitSchema = z.object({
  id: idSchema, rev: z.int(), serial: z.string(), channel: z.int().nullable(), model: z.string(), firmware: z.string().nullable(),
  actuatorSerial: z.string().nullable(), actuatorModel: z.string().nullable(), location: z.string(), state: z.enum(unitStates),
  siteId: idSchema.nullable(), /** Where it sits now. */ axis: z.object({ id: idSchema, tag: z.string() }).nullable(),
  /** A nameplate of its model is registered. */ modelKnown: z.boolean(),
})
export type Unit = z.infer<typeof unitSchema>
export const unitQuery = z.strictObject({
  limit: z.coerce.number().int().min(1).max(200).optional(), cursor: z.string().max(200).optional(),
  search: z.string().max(80).optional(), state: z.enum(unitStates).optional(), model: z.string().max(64).optional(),
})

export const fittingBody = z.strictObject({ axisId: idSchema, unitId: idSchema, at: instantSchema })
export const fittingEndBody = z.strictObject({ at: instantSchema, unitState: z.enum(['spare', 'failed', 'repair', 'scrapped']) })
export const fittingSchema = z.object({
  id: idSchema, axisId: idSchema, axisTag: z.string(), unitId: idSchema, serial: z.string(), from: instantSchema, to: instantSchema.nullable(),
})
export type Fitting = z.infer<typeof fittingSchema>

type Clearable<Shape extends z.ZodRawShape> = { [Key in keyof Shape]: z.ZodOptional<z.ZodNullable<Shape[Key] & z.ZodType>> }
/** The members of a merge patch (RFC 7396): each may be left out, and null clears it. */
const clearable = <Shape extends z.ZodRawShape>(shape: Shape) =>
  Object.fromEntries(Object.entries(shape).map(([key, schema]) => [key, (schema as z.ZodType).nullable().optional()])) as Clearable<Shape>

/** POST adds a revision; PATCH adds one that differs in the named fields (rev = the revision read). */
export const nameplateBody = nameplateSchema
export const nameplatePatch = z.strictObject({
  ...rev, ...clearable(nameplateSchema.shape),
  dictionary: z.record(z.string().min(1).max(64), z.strictObject(clearable(dictionaryEntrySchema.shape)).nullable()).nullable().optional(),
})
export const nameplateRecord = z.object({
  id: idSchema.describe('of the newest revision'), model: z.string(), revision: z.int(), rev: z.int(), madeAt: instantSchema, madeBy: z.string(),
  nameplate: nameplateSchema, units: z.int().describe('registered units of the model'),
})
export type NameplateRecord = z.infer<typeof nameplateRecord>
export const nameplateRevision = z.object({ id: idSchema, revision: z.int(), madeAt: instantSchema, madeBy: z.string(), nameplate: nameplateSchema })
export type NameplateRevision = z.infer<typeof nameplateRevision>

export const ruleScopes = ['site', 'machine', 'axis'] as const
const ruleValue = z.union([z.number(), z.boolean(), z.string().max(256)])
export const ruleBody = z.strictObject({
  scope: z.enum(ruleScopes), scopeId: idSchema, field: z.string().min(1).max(80),
  min: z.number().optional(), max: z.number().optional(), fixed: ruleValue.optional(), reason: reasonSchema,
})
export const ruleEndBody = z.strictObject({ reason: reasonSchema })
export const ruleSchema = z.object({
  id: idSchema, scope: z.enum(ruleScopes), scopeId: idSchema, scopeName: z.string(), field: z.string(), min: z.number().nullable(), max: z.number().nullable(),
  fixed: ruleValue.nullable(), reason: z.string(), madeAt: instantSchema, madeBy: z.string(), endedAt: instantSchema.nullable(), endedBy: z.string().nullable(), endReason: z.string().nullable(),
})
export type Rule = z.infer<typeof ruleSchema>
export const placeQuery = z.strictObject({ limit: z.coerce.number().int().min(1).max(200).optional(), cursor: z.string().max(200).optional(), siteId: idText.optional(), lineId: idText.optional(), machineId: idText.optional() })
