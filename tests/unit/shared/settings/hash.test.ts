import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { canonicalText } from '../../../../shared/settings/canonical'
import { emptyContent } from '../../../../shared/settings/content'
import { hashesOf } from '../../../../shared/settings/hash'

const sha256 = (bytes: Uint8Array) => new Uint8Array(createHash('sha256').update(bytes).digest())

describe('the hashes of a content', () => {
  it('are those of the format for the empty linear content', () => {
    const content = emptyContent('linear')
    expect(canonicalText(content)).toBe('{"axisKind":"linear","extra":{},"moves":[],"setup":{},"zones":[]}')
    const hash = 'c4e62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f'
    expect(hashesOf(content, sha256)).toEqual({ contentHash: hash, copyHash: hash, scribeCode: 'RKK20-GSKBY' })
  })
})
