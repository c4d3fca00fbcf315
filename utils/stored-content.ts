import type { z } from 'zod'
import type { contentSchema } from '#shared/api/versions'
import type { Content } from '#shared/settings/types'

/** A stored content as its own type: the vault only ever stores what the reader of the format has built. */
export function storedContent(content: z.infer<typeof contentSchema>): Content {
  return content as unknown as Content
}
