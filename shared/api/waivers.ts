import { z } from 'zod'
import { idSchema, instantSchema, passwordSchema, reasonSchema } from './common'

const word = z.string().max(200)
const coveredValue = z.union([
  z.number(), z.boolean(), z.string().max(4000), z.null(), z.array(z.number()).max(1000), z.array(word).max(1000), z.strictObject({ value: z.number(), unit: word }),
])
/** What a waiver is good for: the values at the places of a stop; or what was missing, whatever the values. */
const coversSchema = z.discriminatedUnion('level', [
  z.strictObject({ level: z.literal('stop'), values: z.array(z.strictObject({ place: word, value: coveredValue })).max(1000) }),
  z.strictObject({ level: z.literal('unknown'), missing: z.array(word).max(100) }),
])

/** `at` as the check names its places, `value` as coverOf() has it for the content that was looked at. */
export const waiverBody = z.strictObject({
  axisId: idSchema, rule: z.string().min(1).max(80), at: z.array(word).max(1000), value: coversSchema,
  reason: reasonSchema, until: instantSchema, password: passwordSchema,
})
export const waiverEndBody = z.strictObject({ reason: reasonSchema, password: passwordSchema })

export const waiverSchema = z.object({
  id: idSchema, axisId: idSchema, rule: z.string(), at: z.array(z.string()), value: coversSchema, reason: z.string(), until: instantSchema,
  by: z.string(), givenAt: instantSchema, endedAt: instantSchema.nullable(), endedBy: z.string().nullable(), endReason: z.string().nullable(),
})
export type WaiverRecord = z.infer<typeof waiverSchema>
