import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { judge } from '../../../../shared/checks/judge'
import { coverOf } from '../../../../shared/checks/waivers'
import { applyFlat } from '../../../../shared/diff/apply'
import { applyRenumbered } from '../../../../shared/diff/apply-renumbered'
import { compareContents } from '../../../../shared/diff/compare'
import { diffContents } from '../../../../shared/diff/diff'
import { jsonPatchOf } from '../../../../shared/diff/json-patch'
import { diffRenumbered } from '../../../../shared/diff/renumber'
import { canonicalText } from '../../../../shared/settings/canonical'
import { hashesOf } from '../../../../shared/settings/hash'
import { moveRow } from '../../../../shared/settings/move-row'
import { schemaName, type Content, type SettingsFile } from '../../../../shared/settings/types'
import { writeCsv } from '../../../../shared/settings/write-csv'
import { writeJson } from '../../../../shared/settings/write-json'
import { arbitraryContent, arbitraryPair } from '../../../support/arbitrary-content'

/*
 * Readers give every key to every row, undefined where nothing is set; the wire and tests give only what is set. Nobody may
 * see a difference.
 */

const whole = (content: Content): Content => ({ ...content, moves: content.moves.map(moveRow) })
const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest()
const fileOf = (content: Content): SettingsFile => ({ ...content, schema: schemaName, unit: { serial: 'LP-2207-0148', model: 'HL40-200V' }, exportedAt: '2026-11-30T08:15:00+01:00', readings: {} })

describe('a key that is undefined is a key that is absent', () => {
  it('in text, hashes and both forms of the file', () => {
    fc.assert(fc.property(arbitraryContent(), (content) => {
      expect(canonicalText(whole(content))).toBe(canonicalText(content))
      expect(canonicalize(whole(content))).toBe(canonicalText(content))
      expect(hashesOf(whole(content), sha256)).toEqual(hashesOf(content, sha256))
      expect(writeJson(fileOf(whole(content)))).toBe(writeJson(fileOf(content)))
      expect(writeCsv(fileOf(whole(content)))).toBe(writeCsv(fileOf(content)))
      expect(JSON.stringify(whole(content).moves.map(move => ({ ...move })))).not.toContain('null')
    }))
  })

  it('in differences of either reading, what they are applied to, and patches, to the last key', () => {
    fc.assert(fc.property(arbitraryPair(), ([before, after]) => {
      const changes = diffContents(before, after)
      const renumbered = diffRenumbered(before, after)
      for (const [was, is] of [[whole(before), after], [before, whole(after)], [whole(before), whole(after)]] as const) {
        expect(diffContents(was, is)).toStrictEqual(changes)
        expect(diffRenumbered(was, is)).toStrictEqual(renumbered)
        expect(compareContents(was, is, { sameUnit: true })).toStrictEqual(compareContents(before, after, { sameUnit: true }))
        expect(jsonPatchOf(was, is)).toStrictEqual(jsonPatchOf(before, after))
        expect(applyFlat(was, changes)).toStrictEqual(applyFlat(before, changes))
        if (renumbered) expect(applyRenumbered(was, renumbered)).toStrictEqual(applyRenumbered(before, renumbered))
      }
    }))
  })

  it('in judgements and in what a waiver of each result would cover', () => {
    fc.assert(fc.property(arbitraryContent({ alike: true }), (content) => {
      const judged = (of: Content) => judge({ content: of, axis: { axisKind: of.axisKind, flags: ['gravity', 'press'] }, unit: { model: 'HL40-200V' }, registered: { model: 'HL40-200V' }, rules: [] })
      const plain = judged(content)
      expect(judged(whole(content))).toStrictEqual(plain)
      for (const result of plain.results) expect(coverOf(result, whole(content))).toStrictEqual(coverOf(result, content))
    }), { numRuns: 60 })
  })
})
