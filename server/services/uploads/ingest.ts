import { contentOf } from '#shared/settings/content'
import { hashContent, type HashedContent } from '#shared/settings/hash'
import type { Dictionary } from '#shared/settings/nameplate'
import { withoutReadings } from '#shared/settings/readings'
import type { Content, Normalised, ReadSettings, SettingsFile } from '#shared/settings/types'
import { sha256 } from '#server/database/sha256'

/** Kept with each version: which reader and which difference made what is derived from its bytes. */
export const engineVersion = 'reader 1, difference 1'

/** A file ready to be stored; pure, nothing of it has touched the vault yet. */
export interface Ingested extends HashedContent {
  readonly file: SettingsFile
  readonly content: Content
  readonly normalised: Normalised
}

/** Content and hashes of a file that was read; extra keys that the model's dictionary calls readings go to the readings. */
export function ingest({ file, normalised }: ReadSettings, dictionary?: Dictionary): Ingested {
  const settled = withoutReadings(file, dictionary)
  const content = contentOf(settled)
  return { file: settled, content, ...hashContent(content, sha256), normalised }
}
