import { CodedError } from '../errors/coded'
import { canonicalJson } from './canonical'

/** Deeper than any log entry; what lies deeper is left to canonicalJson, which refuses it. */
const deepest = 100

/**
 * Whether a text is the canonical form of the value that JSON.parse made of it; the same as comparing it with canonicalJson,
 * several times faster where it is. JSON.stringify prints numbers and texts as RFC 8785 wants them, so only the order of the
 * keys is left, and half a surrogate pair, which it would write down.
 */
export function isCanonicalText(text: string, value: unknown): boolean {
  if (JSON.stringify(value) === text && hasSortedKeys(value, 0) && !text.includes('\\ud')) return true
  try {
    return canonicalJson(value) === text
  }
  catch (error) {
    if (error instanceof CodedError) return false
    throw error
  }
}

function hasSortedKeys(value: unknown, depth: number): boolean {
  if (typeof value !== 'object' || value === null) return true
  if (depth > deepest) return false
  if (Array.isArray(value)) return value.every(each => hasSortedKeys(each, depth + 1))
  const members = value as Readonly<Record<string, unknown>>
  let before: string | undefined
  for (const key in members) {
    if (before !== undefined && !(before < key)) return false
    if (!hasSortedKeys(members[key], depth + 1)) return false
    before = key
  }
  return true
}
