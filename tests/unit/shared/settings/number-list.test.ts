import { createHash } from 'node:crypto'
import { existsSync, readFileSync } from 'node:fs'
import canonicalize from 'canonicalize'
import { describe, expect, it } from 'vitest'
import { canonicalJson } from '../../../../shared/settings/canonical'

/*
 * The long list of numbers that the authors of RFC 8785 publish beside it (github cyberphone/json-canonicalization,
 * testdata/README.md, commit 19d51d7fe467): fixed values, 2,000 that follow each other bit by bit, then doubles out of a
 * chain of SHA-256. Their fixed values are not part of this project: where a copy lies beside it, the hashes of the list are
 * held too; the bits in a row and the chain are always, against a general library.
 */

const besideThis = new URL('../../../../../shared/check-values/vectors/rfc8785-jcs.json', import.meta.url)
interface Published {
  readonly objects: readonly { readonly name: string, readonly input_text: string, readonly canonical_text: string, readonly sha256_of_canonical: string }[]
  readonly es6_generator: { readonly static_u64_hex: readonly string[] }
}
const published = existsSync(besideThis) ? JSON.parse(readFileSync(besideThis, 'utf8')) as Published : undefined

const view = new DataView(new ArrayBuffer(8))
function doubleOf(bits: bigint): number {
  view.setBigUint64(0, bits)
  return view.getFloat64(0)
}

/** 2,000 neighbours from the smallest normal double on. */
const inARow = Array.from({ length: 2000 }, (_, index) => 0x0010000000000000n + BigInt(index))

/** Doubles of a chain of hashes, four a link, those that JSON has no number for and zeros left out. */
function* chained(): Generator<bigint> {
  let block = createHash('sha256').update(new Uint8Array(32)).digest()
  for (;;) {
    for (const offset of [0, 8, 16, 24]) {
      const bits = block.readBigUInt64LE(offset)
      const value = doubleOf(bits)
      if (value !== 0 && Number.isFinite(value)) yield bits
    }
    block = createHash('sha256').update(block).digest()
  }
}

function* first(count: number, bits: Iterable<bigint>): Generator<bigint> {
  let left = count
  for (const each of bits) {
    if (left-- <= 0) return
    yield each
  }
}

const sha256 = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex')

describe('numbers in a row and numbers out of a chain', () => {
  it('are written as a general library writes them, and read back to the last bit', () => {
    for (const bits of [...inARow, ...first(8000, chained())]) {
      const value = doubleOf(bits)
      const text = canonicalJson(value)
      expect(text).toBe(canonicalize(value))
      view.setFloat64(0, Number(text))
      expect(view.getBigUint64(0)).toBe(bits)
    }
  })

  it('are all different, as their bits are', () => {
    const texts = [...inARow, ...first(2000, chained())].map(bits => canonicalJson(doubleOf(bits)))
    expect(new Set(texts).size).toBe(texts.length)
  })
})

if (published) {
  const { objects, es6_generator: { static_u64_hex: fixed } } = published
  function* list(): Generator<bigint> {
    for (const hex of fixed) yield BigInt(`0x${hex}`)
    yield* inARow
    yield* chained()
  }
  const lines = (count: number) => [...first(count, list())].map(bits => `${bits.toString(16)},${canonicalJson(doubleOf(bits))}\n`).join('')

  describe('the published list', () => {
    it.each([
      [1000, 37_967, 'be18b62b6f69cdab33a7e0dae0d9cfa869fda80ddc712221570f9f40a5878687'],
      [10_000, 399_022, 'b9f7a8e75ef22a835685a52ccba7f7d6bdc99e34b010992cbc5864cd12be6892'],
    ])('of %d lines has %d bytes and its hash', (count, bytes, hash) => {
      const text = lines(count)
      expect(text).toHaveLength(bytes)
      expect(sha256(text)).toBe(hash)
    })
  })

  describe('the published objects', () => {
    it.each(objects.map(each => [each.name, each] as const))('%s', (_name, { input_text: input, canonical_text: text, sha256_of_canonical: hash }) => {
      expect(canonicalJson(JSON.parse(input))).toBe(text)
      expect(sha256(canonicalJson(JSON.parse(input)))).toBe(hash)
    })
  })
}
