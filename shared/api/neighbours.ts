import { z } from 'zod'
import { idSchema } from './common'
import { checkSchema } from './versions'

/** An answer about several axes as they stand now; it is kept nowhere. */
const liveResult = checkSchema.extend({ axes: z.array(z.string()) })

/** How many columns a matrix has at most, and how many results are told. */
export const neighboursTold = { columns: 48, results: 200 } as const

export const sisterGroup = z.object({
  role: z.string(), model: z.string(),
  /** How many sisters there are. */
  of: z.int(),
  /** The columns, by tag: all of them, or those of the machine, those that stand apart, and then others. */
  axes: z.array(z.object({ id: idSchema, tag: z.string(), machineId: idSchema })),
  /** A row a value that can hurt: `same` on all sisters, `texts` and the indices of the `odd` ones by column. */
  rows: z.array(z.object({ key: z.string(), words: z.string(), same: z.boolean(), texts: z.array(z.string()), odd: z.array(z.int()) })),
  results: z.array(liveResult),
  /** Results beyond those listed. */
  more: z.int(),
})
export type SisterGroup = z.infer<typeof sisterGroup>

export const busGroup = z.object({ bus: z.string(), of: z.int().describe('how many axes of the site hang on it'), results: z.array(liveResult), more: z.int() })
export const neighboursAnswer = z.object({ sisters: z.array(sisterGroup), buses: z.array(busGroup) })
export type Neighbours = z.infer<typeof neighboursAnswer>
