import { z } from 'zod'
import { idSchema, instantSchema } from './common'
import { openSwapSchema } from './open-swap'
import { lacks } from './readiness'
import { axisStatuses, levelCounts, weightCounts } from './versions'

export const boardAxis = z.object({
  id: idSchema, tag: z.string(), role: z.string(), site: z.string(), line: z.string(), machine: z.string(), machineId: idSchema, timeZone: z.string(),
  serial: z.string().nullable(), model: z.string().nullable(), status: z.enum(axisStatuses), off: weightCounts, sense: z.enum(['more', 'less']).nullable(),
  lastUploadAt: instantSchema.nullable(), overdueSince: instantSchema.nullable(),
  knownGood: z.object({ versionId: idSchema, number: z.int(), at: instantSchema }).nullable(),
  current: z.object({ versionId: idSchema, number: z.int() }).nullable(), checks: levelCounts,
  lacks: z.array(z.enum(lacks)).describe('why it could not be restored tonight; empty = it could'),
  swap: openSwapSchema.nullable(),
})
export type BoardAxis = z.infer<typeof boardAxis>

export const attentionKinds = ['swap-unreleased', 'finding', 'stop-check', 'off-known-good', 'unmarked', 'overdue', 'never-read', 'tray'] as const
/** What needs someone now, worst first; `items` names up to five. */
export const attentionSchema = z.object({
  kind: z.enum(attentionKinds), count: z.int(), since: instantSchema.nullable().describe('the oldest'),
  items: z.array(z.object({ axisId: idSchema.nullable(), tag: z.string(), versionId: idSchema.nullable(), knownGoodId: idSchema.nullable(), findingId: idSchema.nullable(), text: z.string(), since: instantSchema.nullable() })),
})
export type Attention = z.infer<typeof attentionSchema>
export const boardAnswer = z.object({ asOf: instantSchema, plant: z.string(), axes: z.array(boardAxis), attention: z.array(attentionSchema), pending: z.int().describe('axes of which it is still being worked out whether a spare fits; what was known before stands so long, and nothing known as no spare'), log: z.object({ entries: z.int() }) })
export type Board = z.infer<typeof boardAnswer>

export const logEntrySchema = z.object({ seq: z.int(), leaf: z.string().describe('the very string that is hashed'), hash: z.string().describe('SHA-256 of 0x00 and the leaf, lower-case hex') })
export const healthSchema = z.object({
  status: z.enum(['ok', 'failing']), schema: z.int(), writable: z.boolean(),
  verified: z.boolean().describe('the last verification found the vault sound, and is not older than 26 h'),
  lettersWaitingSince: instantSchema.nullable().describe('when the oldest letter that has not left was written'),
})
