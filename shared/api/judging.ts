import { z } from 'zod'
import { idSchema } from './common'
import { judgedSchema, levelCounts, waivableCheck } from './versions'

/** `changed`: whether it says something else than the judgement before. */
export const judgedAgain = z.object({ changed: z.boolean(), checks: z.array(waivableCheck), judged: judgedSchema })

/** `from`: how many of `changed` the caller has already. */
export const runQuery = z.strictObject({ from: z.coerce.number().int().min(0).optional() })

/** A current version that is judged otherwise than before. */
export const rejudged = z.object({
  axisId: idSchema, tag: z.string(), versionId: idSchema, number: z.int(), before: levelCounts, after: levelCounts,
  /** Stops that stand now; accepted ones are left out. */
  stops: z.int(),
  /** The first stop that was not there before. */
  message: z.string().nullable(),
})
export type Rejudged = z.infer<typeof rejudged>

export const runSchema = z.object({
  id: idSchema, done: z.int(), of: z.int(), changed: z.array(rejudged),
  /** Why it broke off; what it judged until then is kept. */
  problem: z.string().nullable(),
})
export type JudgingRun = z.infer<typeof runSchema>
