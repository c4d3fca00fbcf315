import { createHash } from 'node:crypto'
import type { Sha256, ContentHashes } from '#shared/settings/hash'
import { canonicalText } from '#shared/settings/canonical'
import { contentOf } from '#shared/settings/content'
import { hashesOf } from '#shared/settings/hash'
import type { Dictionary } from '#shared/settings/nameplate'
import { withoutReadings } from '#shared/settings/readings'
import type { Content, Normalised, ReadSettings, SettingsFile } from '#shared/settings/types'

/** Kept with each version: which reader and which difference made what is derived from its bytes. */
export const engineVersion = 'reader 1, difference 1'

export const sha256: Sha256 = bytes => createHash('sha256').update(bytes).digest()

/** A file ready to be stored; pure, nothing of it has touched the vault yet. */
export interface Ingested {
  readonly file: SettingsFile
  readonly content: Content
  /** Canonical text of the content: what contentHash is made from. */
  readonly text: string
  readonly hashes: ContentHashes
  readonly normalised: Normalised
}

/** Content and hashes of a file that was read; extra keys that the model's dictionary calls readings go to the readings. */
export function ingest({ file, normalised }: ReadSettings, dictionary?: Dictionary): Ingested {
  const settled = withoutReadings(file, dictionary)
  const content = contentOf(settled)
  return { file: settled, content, text: canonicalText(content), hashes: hashesOf(content, sha256), normalised }
}
