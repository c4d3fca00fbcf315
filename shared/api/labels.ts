import { z } from 'zod'
import { idSchema, instantSchema } from './common'

/** Of a label in mm. */
export const labelSizes = ['100x50', '50x25'] as const

/** `form=pdf`: one label a page, true size. `machine`: of every axis of the machine, in order of their tags. */
export const labelQuery = z.strictObject({ form: z.enum(['json', 'pdf']).optional(), size: z.enum(labelSizes).optional(), machine: z.enum(['true']).optional() })
export const labelBody = z.strictObject({ size: z.enum(labelSizes) })

/** What stands on the label of an axis: no values, since they change and the tag does not. */
export const labelSchema = z.object({
  axisId: idSchema, tag: z.string(), role: z.string(), machine: z.string(), line: z.string(), /** A load can fall there. */ falls: z.boolean(),
  /** What its QR code says. */ address: z.string(),
  printed: z.object({ at: instantSchema, by: z.string(), tag: z.string(), size: z.enum(labelSizes) }).nullable(),
})
export type Label = z.infer<typeof labelSchema>
export const labelList = z.object({ labels: z.array(labelSchema), machine: z.object({ id: idSchema, name: z.string(), axes: z.int() }), timeZone: z.string() })
export type LabelList = z.infer<typeof labelList>
