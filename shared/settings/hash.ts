import type { Content } from './types'
import { contentParts } from './canonical'
import { scribeCode } from './scribe'

/** A hash function handed in by the caller: `shared/` has neither Node's crypto nor the browser's. Answers 32 bytes. */
export type Sha256 = (bytes: Uint8Array) => Uint8Array

/** Hashes in 64 lower-case hex digits. */
export interface ContentHashes {
  /** SHA-256 of the canonical text, plain, so that anyone can recompute it. */
  readonly contentHash: string
  /** The same without `setup.homeOffset`, which every unit has its own of. */
  readonly copyHash: string
  /** The first 50 bits of copyHash, for the eye and the phone. */
  readonly scribeCode: string
}

/** What is stored of a content: its canonical text, and the hashes made from it. */
export interface HashedContent { readonly text: string, readonly hashes: ContentHashes }

const encoder = new TextEncoder()
const hexOf = Array.from({ length: 256 }, (_, byte) => byte.toString(16).padStart(2, '0'))

/** SHA-256 of bytes in lower-case hex, two digits a byte. */
export function sha256Hex(bytes: Uint8Array, sha256: Sha256): string {
  let hex = ''
  for (const byte of sha256(bytes)) hex += hexOf[byte]
  return hex
}

function joined(...parts: readonly Uint8Array[]): Uint8Array {
  const all = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0))
  let at = 0
  for (const part of parts) {
    all.set(part, at)
    at += part.length
  }
  return all
}

/** Canonical text and hashes in one go; the content must be in order, as readers and contentOf give it. */
export function hashContent(content: Content, sha256: Sha256): HashedContent {
  const { before, setup, copySetup, after } = contentParts(content)
  const [start, end] = [encoder.encode(before), encoder.encode(after)]
  // The two hashes differ in the setup alone: long move tables are encoded once.
  const hashWith = (middle: string) => sha256Hex(joined(start, encoder.encode(middle), end), sha256)
  const contentHash = hashWith(setup)
  const copyHash = copySetup === setup ? contentHash : hashWith(copySetup)
  return { text: before + setup + after, hashes: { contentHash, copyHash, scribeCode: scribeCode(copyHash) } }
}

/** Both hashes of a content and its scribe code; see hashContent where the text is needed as well. */
export function hashesOf(content: Content, sha256: Sha256): ContentHashes {
  return hashContent(content, sha256).hashes
}

/**
 * The copy hash of a canonical text, without reading it: its setup is flat, its zones hold numbers alone, and no text in either
 * has a quotation mark, so that its member homeOffset can be cut out where it stands. undefined where there is no such setup.
 */
export function copyHashOfText(text: string, sha256: Sha256): string | undefined {
  const end = text.lastIndexOf('},"zones":[')
  const start = text.lastIndexOf(',"setup":{', end)
  if (end < 0 || start < 0) return undefined
  const setup = text.slice(start, end)
  const copied = setup.replace(/(?<=\{)"homeOffset":[^,]+,?|,"homeOffset":[^,]+/, '')
  return sha256Hex(encoder.encode(text.slice(0, start) + copied + text.slice(end)), sha256)
}
