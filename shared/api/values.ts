import { z } from 'zod'
import { valueSections } from '../settings/value-place'
import { idSchema, instantSchema } from './common'
import { extraValue, occasions } from './versions'

/** `section` is setup where it is left out; `row` is the number of a move or zone. */
export const valuesQuery = z.strictObject({
  section: z.enum(valueSections).optional(), field: z.string().min(1).max(80), row: z.coerce.number().int().min(0).max(65535).optional(),
})

/** One step: the version with which the value became what it is. Null = not set from here on. */
const valueStep = z.object({
  versionId: idSchema, number: z.int(), /** When it was read: what the line is drawn by. */ at: instantSchema, capturedAt: instantSchema,
  value: extraValue.nullable(), unit: z.string(),
  /** The version before, and when its value was seen last; null for the first. */
  before: z.object({ versionId: idSchema, number: z.int(), seenAt: instantSchema }).nullable(),
  occasion: z.enum(occasions), changedBy: z.string().nullable(), allowedBy: z.string().nullable(), storedBy: z.string(),
  reason: z.string().nullable(), workOrder: z.string().nullable(), serial: z.string(), model: z.string(),
})
export type ValueStep = z.infer<typeof valueStep>

/** What was known-good, and how long; `value` null = not set there. `to` null = still. */
const knownGoodSpan = z.object({ versionId: idSchema, number: z.int(), from: instantSchema, to: instantSchema.nullable(), value: extraValue.nullable() })
/** A bound from outside the settings: a site rule, or the nameplate of the model that sat there. `to` null = still. */
const valueBound = z.object({
  by: z.enum(['rule', 'nameplate']), min: z.number().optional(), max: z.number().optional(), from: instantSchema, to: instantSchema.nullable(),
  /** The reason of the rule, the model of the nameplate. */ words: z.string(),
})
export type ValueBound = z.infer<typeof valueBound>

export const valuesAnswer = z.object({
  section: z.enum(valueSections), field: z.string(), row: z.int().nullable(),
  /** Oldest first. */
  steps: z.array(valueStep), knownGood: z.array(knownGoodSpan), bounds: z.array(valueBound),
  /** How many versions the steps are told from, and how many void ones were left out. */
  versions: z.int(), leftOut: z.int(),
})
export type ValuesAnswer = z.infer<typeof valuesAnswer>
