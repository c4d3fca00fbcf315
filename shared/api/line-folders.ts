import { z } from 'zod'
import { idSchema, instantSchema } from './common'

/** `kept`: the one of last night; without it, made now. */
export const folderQuery = z.strictObject({ kept: z.enum(['true']).optional() })

export const folderStatus = z.object({
  lineId: idSchema, line: z.string(), site: z.string(), timeZone: z.string(), axes: z.int(),
  /** The newest one that was kept; null = none ever was. */
  kept: z.object({ madeAt: instantSchema, bytes: z.int(), axes: z.int() }).nullable(),
  /** Why a later one could not be made; the kept one stays. */
  failed: z.object({ at: instantSchema, problem: z.string() }).nullable(),
})
export type FolderStatus = z.infer<typeof folderStatus>
export const folderList = z.object({ items: z.array(folderStatus) })
