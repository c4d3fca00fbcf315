/*
 * Texts are kept in NFC and never trimmed; lengths count code points. Refused are lone surrogates, control characters and
 * the bidirectional controls, which could make a value look like another one.
 */

export interface TextRule {
  readonly min: number
  readonly max: number
  /** Tab and line feed are allowed; CR LF becomes LF. */
  readonly lines?: true
  readonly pattern?: RegExp
  /** Which characters the pattern allows, in words. */
  readonly allowed?: string
}

const namePattern = { pattern: /^[A-Za-z0-9._/-]*$/, allowed: 'A-Z a-z 0-9 . _ / -' }

export const textRules = {
  serial: { min: 1, max: 64, ...namePattern },
  actuatorSerial: { min: 1, max: 64, ...namePattern },
  model: { min: 1, max: 64 },
  actuatorModel: { min: 1, max: 64 },
  firmware: { min: 1, max: 32 },
  exportedBy: { min: 1, max: 80 },
  exportedAt: { min: 1, max: 64 },
  note: { min: 1, max: 2000, lines: true },
  label: { min: 1, max: 40 },
  comment: { min: 1, max: 200 },
  extraKey: { min: 1, max: 64 },
  extraText: { min: 0, max: 256 },
  extraUnit: { min: 1, max: 32 },
} as const satisfies Record<string, TextRule>

export interface TextFault { readonly code: 'text-length' | 'text-character', readonly message: string }

const plainAscii = /^[\x20-\x7e]*$/
// Cc: control characters, Cs: surrogates that stand alone (a pair is one code point under the u flag).
const refused = /[\p{Cc}\p{Cs}\u202a-\u202e\u2066-\u2069\ufeff]/u
const refusedInLines = /(?![\t\n])[\p{Cc}\p{Cs}\u202a-\u202e\u2066-\u2069\ufeff]/u

/** The text as it is kept (NFC), or what is wrong with it. */
export function checkText(sent: string, rule: TextRule): string | TextFault {
  const ascii = plainAscii.test(sent)
  const text = ascii ? sent : (rule.lines ? sent.replaceAll('\r\n', '\n') : sent).normalize('NFC')
  if (!ascii) {
    const found = (rule.lines ? refusedInLines : refused).exec(text)
    if (found) return { code: 'text-character', message: `Character ${codeName(found[0])} is not allowed here; take it out.` }
  }
  const length = ascii ? text.length : [...text].length
  if (length < rule.min || length > rule.max) {
    return { code: 'text-length', message: `${length} characters; ${rule.min} to ${rule.max} are allowed.` }
  }
  if (rule.pattern && !rule.pattern.test(text)) {
    return { code: 'text-character', message: `Only ${rule.allowed ?? 'other characters'} are allowed here.` }
  }
  return text
}

/** U+XXXX of the first code unit or point. */
function codeName(character: string): string {
  return `U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}`
}
