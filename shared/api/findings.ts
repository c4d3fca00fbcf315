import { z } from 'zod'
import { weights } from '../settings/types'
import { axisRef, idSchema, idText, instantSchema, listQuery, passwordSchema, reasonSchema } from './common'
import { changeSchema } from './versions'

export const findingStates = ['open', 'explained', 'closed'] as const
export type FindingState = (typeof findingStates)[number]
/** What can make a person explain something. */
export const findingCauses = ['watched-change', 'stop-check', 'read-back', 'off-known-good', 'unfit', 'axis-disagrees', 'verification'] as const
export type FindingCause = (typeof findingCauses)[number]
export const findingActKinds = ['explained', 'closed', 'reopened'] as const
export const closings = ['accepted', 'put-right'] as const

export const findingQuery = listQuery.extend({ state: z.enum(findingStates).optional(), axis: axisRef.optional(), site: idText.optional(), weight: z.enum(weights).optional() })
const personText = z.string().min(1).max(80).describe('free text, or person:ID')
export const explainBody = z.strictObject({ text: reasonSchema, by: personText.optional().describe('who did it: free text, or person:ID'), at: instantSchema.optional().describe('when it was done'), workOrder: z.string().min(1).max(80).optional() })
export const closeBody = z.strictObject({
  as: z.enum(closings), allowedBy: personText.optional().describe('accepted: who allowed it'), versionId: idSchema.optional().describe('put right: the version that shows it'), password: passwordSchema,
})
export const reopenBody = z.strictObject({ text: reasonSchema })

/** One thing that happened at one axis: the version that showed it, and what it was compared with. */
const findingVersion = z.object({
  at: instantSchema, axisId: idSchema, tag: z.string(), versionId: idSchema.nullable(), number: z.int().nullable(), capturedAt: instantSchema.nullable(),
  baseId: idSchema.nullable(), baseNumber: z.int().nullable(), says: z.string(), changes: z.array(changeSchema),
})
const findingAct = z.object({
  kind: z.enum(findingActKinds), at: instantSchema, by: z.string(), text: z.string().nullable(), madeBy: z.string().nullable(), madeAt: instantSchema.nullable(), workOrder: z.string().nullable(),
  plannedChangeId: idSchema.nullable(), as: z.enum(closings).nullable(), allowedBy: z.string().nullable(), version: z.object({ id: idSchema, tag: z.string(), number: z.int() }).nullable(),
})
export type FindingAct = z.infer<typeof findingAct>

export const findingSchema = z.object({
  id: idSchema, state: z.enum(findingStates), cause: z.enum(findingCauses), weight: z.enum(weights), title: z.string(),
  /** Of the first axis that it names; null where it is about the vault itself. */
  axisId: idSchema.nullable(), tag: z.string().nullable(), timeZone: z.string().nullable(),
  openedAt: instantSchema, dueAt: instantSchema, overdue: z.boolean().describe('not closed, and past its day'),
  changes: z.array(changeSchema), versions: z.array(findingVersion).describe('the first 200'), more: z.int().describe('versions beyond those'),
  explanations: z.array(findingAct).describe('all that was ever said, oldest first'), closure: findingAct.nullable(), acts: z.array(findingAct).describe('oldest first'),
})
export type Finding = z.infer<typeof findingSchema>

const fieldName = z.string().min(1).max(80).describe('thrustLimit, move.speed, zone.from, extra:KEY')
export const plannedChangeBody = z.strictObject({
  axisIds: z.array(idSchema).min(1).max(1000), fields: z.array(fieldName).min(1).max(100), min: z.number().optional(), max: z.number().optional(),
  ranges: z.array(z.strictObject({ field: fieldName, min: z.number().optional(), max: z.number().optional() })).max(100).optional().describe('of fields that have a range of their own; min and max hold for the others'),
  from: instantSchema, until: instantSchema, reason: reasonSchema, allowedBy: personText,
})
export const plannedChangeEndBody = z.strictObject({ reason: reasonSchema })
export const plannedChangeSchema = z.object({
  id: idSchema, axes: z.array(z.object({ id: idSchema, tag: z.string() })), fields: z.array(z.string()), min: z.number().nullable(), max: z.number().nullable(),
  ranges: z.array(z.object({ field: z.string(), min: z.number().nullable(), max: z.number().nullable() })).describe('each field with the range that holds for it'),
  from: instantSchema, until: instantSchema, reason: z.string(), allowedBy: z.string(), announcedAt: instantSchema, announcedBy: z.string(), timeZone: z.string(),
  endedAt: instantSchema.nullable(), endedBy: z.string().nullable(), endReason: z.string().nullable(),
  /** The findings that it explained, oldest first. */
  came: z.array(z.object({ findingId: idSchema, at: instantSchema, tag: z.string(), versionId: idSchema.nullable(), number: z.int().nullable(), title: z.string(), state: z.enum(findingStates) })),
})
export type PlannedChange = z.infer<typeof plannedChangeSchema>
