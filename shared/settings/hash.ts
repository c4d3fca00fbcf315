import type { Sha256 } from '../errors/result'
import type { Content } from './types'
import { contentTexts } from './canonical'
import { scribeCode } from './scribe'

/** Hashes in 64 lower-case hex digits. */
export interface ContentHashes {
  /** SHA-256 of the canonical text, plain, so that anyone can recompute it. */
  readonly contentHash: string
  /** The same without `setup.homeOffset`, which every unit has its own of. */
  readonly copyHash: string
  /** The first 50 bits of copyHash, for the eye and the phone. */
  readonly scribeCode: string
}

const encoder = new TextEncoder()

/** SHA-256 of a text in UTF-8, in lower-case hex. */
export function sha256Hex(text: string, sha256: Sha256): string {
  let hex = ''
  for (const byte of sha256(encoder.encode(text))) hex += (byte < 16 ? '0' : '') + byte.toString(16)
  return hex
}

/** Both hashes of a content and its scribe code; the content must be in order, as readers and contentOf give it. */
export function hashesOf(content: Content, sha256: Sha256): ContentHashes {
  const texts = contentTexts(content)
  const contentHash = sha256Hex(texts.content, sha256)
  const copyHash = texts.copy === texts.content ? contentHash : sha256Hex(texts.copy, sha256)
  return { contentHash, copyHash, scribeCode: scribeCode(copyHash) }
}
