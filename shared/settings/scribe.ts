import { CodedError } from '../errors/coded'

/*
 * The scribe code is what people compare by eye and on the phone: the first 50 bits of copyHash in Crockford base 32
 * (crockford.com/base32.html), cut in two. Never a key, a proof, or a search term with one answer.
 */

const alphabet = '0123456789ABCDEFGHJKMNPQRSTVWXYZ'
const characters = 10
const hashHex = /^[0-9a-f]{64}$/

/** `XXXXX-XXXXX` from a copyHash in 64 lower-case hex digits; throws 'no-hash' on anything else. */
export function scribeCode(copyHashHex: string): string {
  if (!hashHex.test(copyHashHex)) throw new CodedError('no-hash', 'A scribe code is made from 64 lower-case hex digits.', { copyHashHex })
  // 13 hex digits are 52 bits: a whole number that a double holds exactly. The last two bits are dropped.
  let bits = Math.floor(Number.parseInt(copyHashHex.slice(0, 13), 16) / 4)
  let code = ''
  for (let index = 0; index < characters; index += 1) {
    code = (alphabet[bits % 32] ?? '') + code
    bits = Math.floor(bits / 32)
  }
  return formatScribe(code)
}

function formatScribe(code: string): string {
  return `${code.slice(0, 5)}-${code.slice(5)}`
}

/**
 * The code that a person wrote or said, in its one spelling: case, hyphens and spaces ignored, I and L read as 1, O as 0;
 * undefined where ten characters of the alphabet do not remain. Leaves what scribeCode writes as it is.
 */
export function parseScribeCode(text: string): string | undefined {
  const code = text.toUpperCase().replace(/[-\s]/g, '').replace(/[IL]/g, '1').replaceAll('O', '0')
  const known = code.length === characters && [...code].every(each => alphabet.includes(each))
  return known ? formatScribe(code) : undefined
}
