import { z } from 'zod'
import { swapStates } from '../swap/types'
import { idSchema, instantSchema } from './common'

/** The swap that is open at an axis, as the axis and the board tell of it; the whole of it at /api/swaps/:id. */
export const openSwapSchema = z.object({
  id: idSchema, step: z.enum(swapStates), openedAt: instantSchema, openedBy: z.string(),
  runningSince: instantSchema.nullable().describe('the axis runs again, and nobody has released it'), releaseDueAt: instantSchema, overdue: z.boolean(),
})
export type OpenSwap = z.infer<typeof openSwapSchema>
