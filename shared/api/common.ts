import { z } from 'zod'

/*
 * Wire shapes that every resource uses. No transforms: what stands here is what travels, and the OpenAPI page is made of it.
 * Ids are positive integers, times RFC 3339 UTC with milliseconds, texts are never trimmed by the server.
 */

export const roles = ['technician', 'planner', 'auditor', 'admin'] as const
export const roleSchema = z.enum(roles)
export type Role = z.infer<typeof roleSchema>

export const idSchema = z.int().positive()
/** An id in a path or query, where everything is text. */
export const idText = z.coerce.number().int().positive()
/** An axis by id or as `tag:LID-02.Z`. */
export const axisRef = z.string().regex(/^([1-9]\d{0,15}|tag:[A-Za-z0-9._-]{1,32})$/, 'an axis id or tag:TAG')
export const tagSchema = z.string().regex(/^[A-Za-z0-9._-]{1,32}$/, '1 to 32 of A-Z a-z 0-9 . _ -')
export const serialSchema = z.string().regex(/^[A-Za-z0-9._/-]{1,64}$/, '1 to 64 of A-Z a-z 0-9 . _ / -')
export const instantSchema = z.iso.datetime({ offset: true })
export const nameSchema = z.string().min(1).max(80)
export const reasonSchema = z.string().min(1).max(2000)
export const passwordSchema = z.string().min(1).max(256)

export const listQuery = z.strictObject({
  limit: z.coerce.number().int().min(1).max(200).optional(),
  cursor: z.string().max(200).optional(),
})
export const idParams = z.strictObject({ id: idText })
export const axisParams = z.strictObject({ id: axisRef })

/** A page of a list; `next` is the cursor of the following page, null at the end. A page may be short and still have next. */
export const pageOf = <Item extends z.ZodType>(item: Item) => z.object({ items: z.array(item), next: z.string().nullable() })

export const created = z.object({ id: idSchema })

/** RFC 9457 problem details, with our code and the places. */
export const problemErrorSchema = z.object({
  at: z.string(),
  line: z.int().optional(),
  column: z.int().optional(),
  code: z.string(),
  message: z.string(),
  value: z.string().optional(),
  meant: z.string().optional(),
})
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: z.string(),
  errors: z.array(problemErrorSchema).optional(),
  /** How many more errors there are beyond those listed. */
  more: z.int().optional(),
  /** Where the file is kept that could not be read. */
  tray: idSchema.optional(),
  /** Current state, for edited-meanwhile. */
  current: z.unknown().optional(),
  /** Steps of a swap that come first, for step-missing. */
  missing: z.array(z.string()).optional(),
})
export type Problem = z.infer<typeof problemSchema>
export type ProblemError = z.infer<typeof problemErrorSchema>
