import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalText } from '../../../../shared/settings/canonical'
import { contentOf, emptyContent } from '../../../../shared/settings/content'
import { exampleFiles, pressExample, turntableExample } from '../../../../shared/settings/examples'
import { copyHashOfText, hashContent, hashesOf, sha256Hex } from '../../../../shared/settings/hash'
import { scribeCode } from '../../../../shared/settings/scribe'
import { arbitraryContent } from '../../../support/arbitrary-content'

const sha256 = (bytes: Uint8Array) => new Uint8Array(createHash('sha256').update(bytes).digest())
const hexOf = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex')

describe('the hash function that is handed in', () => {
  // RFC 6234, section 8.5: TEST1, TEST2_1, TEST4; the empty text is the empty root of RFC 9162, 2.1.1.
  it.each([
    ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
    ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
    ['abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq', '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1'],
    ['01234567'.repeat(80), '594847328451bdfa85056225462cc1d867d877fb388df0ce35f25ab5562bfbb5'],
  ])('of %j is written in lower-case hex', (text, hash) => expect(sha256Hex(new TextEncoder().encode(text), sha256)).toBe(hash))

  it('is given UTF-8', () => {
    const content = { ...emptyContent('linear'), extra: { Größe: '² 😀' } }
    expect(hashesOf(content, sha256).contentHash).toBe(hexOf(canonicalText(content)))
  })

  it('has its bytes written in two digits each', () => {
    expect(sha256Hex(new Uint8Array(), () => Uint8Array.from([0, 1, 15, 16, 255]))).toBe('00010f10ff')
  })
})

describe('the hashes of a content', () => {
  it('are those of the format for the empty linear content', () => {
    const content = emptyContent('linear')
    expect(canonicalText(content)).toBe('{"axisKind":"linear","extra":{},"moves":[],"setup":{},"zones":[]}')
    const hash = 'c4e62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f'
    expect(hashesOf(content, sha256)).toEqual({ contentHash: hash, copyHash: hash, scribeCode: 'RKK20-GSKBY' })
  })

  it('are plain: anyone can recompute them from the canonical text', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      const { homeOffset: _offset, ...setup } = content.setup
      const { text, hashes } = hashContent(content, sha256)
      expect(text).toBe(canonicalText(content))
      expect(hashes.contentHash).toBe(hexOf(text))
      expect(hashes.copyHash).toBe(hexOf(canonicalText({ ...content, setup })))
      expect(hashes.scribeCode).toBe(scribeCode(hashes.copyHash))
    }), { numRuns: 100 })
  })

  it('tell a home offset apart in contentHash and not in copyHash', () => {
    for (const file of [pressExample, turntableExample]) {
      const content = contentOf(file)
      const other = { ...content, setup: { ...content.setup, homeOffset: 0.125 } }
      const [one, two] = [hashesOf(content, sha256), hashesOf(other, sha256)]
      expect(two.contentHash).not.toBe(one.contentHash)
      expect(two.copyHash).toBe(one.copyHash)
      expect(two.scribeCode).toBe(one.scribeCode)
    }
  })

  it('differ for every single change of a setup value', () => {
    const content = contentOf(pressExample)
    const { homeOffset: _offset, ...others } = content.setup
    const changed = Object.keys(others).map((name) => {
      const { [name as keyof typeof others]: _left, ...setup } = content.setup
      return hashesOf({ ...content, setup }, sha256).scribeCode
    })
    expect(new Set([...changed, hashesOf(content, sha256).scribeCode]).size).toBe(changed.length + 1)
  })

  it('do not hang on the file around the content', () => {
    for (const file of exampleFiles) {
      expect(hashesOf(contentOf({ ...file, note: 'another', readings: {} }), sha256)).toEqual(hashesOf(contentOf(file), sha256))
    }
  })
})

describe('the copy hash of a canonical text', () => {
  it('law: is that of its content, wherever homeOffset stands', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(copyHashOfText(canonicalText(content), sha256)).toBe(hashesOf(content, sha256).copyHash)
    }), { numRuns: 300 })
  })

  it.each([
    ['alone', { homeOffset: 3.5 }], ['first', { homeOffset: -1e-6, jerk: 2 }], ['last', { brakeFitted: true, homeOffset: 0 }], ['between', { brakeFitted: true, homeOffset: 12, thrustLimit: 40 }], ['nowhere', { thrustLimit: 40 }],
  ])('leaves homeOffset out, %s', (_, setup) => {
    const content = { ...emptyContent('linear'), setup, extra: { 'homeOffset': 7, '},"zones":[': 1, ',"setup":{': '{"homeOffset":1,' } }
    expect(copyHashOfText(canonicalText(content), sha256)).toBe(hashesOf(content, sha256).copyHash)
  })

  it('is none where there is no setup', () => {
    for (const text of ['', '{}', '{"setup":{}', 'a shopping list', '},"zones":[,"setup":{']) expect(copyHashOfText(text, sha256)).toBeUndefined()
  })
})
