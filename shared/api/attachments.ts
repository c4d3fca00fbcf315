import { z } from 'zod'
import { idSchema, instantSchema } from './common'

/** drive-backup: what the drive's own tool saved; it holds values that belong to one unit alone. */
export const attachmentKinds = ['drive-backup', 'photo', 'other'] as const
/** Most bytes of one attachment: 20 MiB. */
export const attachmentLimit = 20 * 1024 * 1024

/** What stands beside the file: in the query of a raw body, or as fields of a multipart one. */
export const attachmentFields = z.strictObject({
  kind: z.enum(attachmentKinds).optional().describe('drive-backup where nothing is said'),
  name: z.string().max(255).optional().describe('file name, for a raw body'),
  note: z.string().max(400).optional(),
})
export type AttachmentFields = z.infer<typeof attachmentFields>

export const attachmentSchema = z.object({
  id: idSchema, versionId: idSchema, kind: z.enum(attachmentKinds), name: z.string(), mediaType: z.string(), note: z.string().nullable(),
  size: z.int(), sha256: z.string(), receivedAt: instantSchema, by: z.string(),
  /** Whose own values it may hold: the unit that the version was read from. */
  unit: z.object({ serial: z.string(), model: z.string() }),
})
export type Attachment = z.infer<typeof attachmentSchema>
export const attachmentList = z.object({ items: z.array(attachmentSchema) })
