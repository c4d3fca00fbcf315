import { createHash } from 'node:crypto'
import { readFileSync, readdirSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { hashesOf } from '../../../../shared/settings/hash'
import { readSettings } from '../../../../shared/settings/read'
import { formatErrorCodes } from '../../../../shared/settings/types'

/*
 * The list of fixtures/settings: each file with what must come of it. The hashes in it were computed from contents written
 * by hand, with another program than this one.
 */

interface ErrorCase { readonly code: string, readonly at: string, readonly line?: number, readonly column?: number, readonly meant?: string }
interface Case {
  readonly file: string
  readonly form: 'json' | 'csv'
  readonly what: string
  readonly decimal?: 'point' | 'comma'
  readonly errors?: readonly ErrorCase[]
  readonly more?: number
  readonly contentHash?: string
  readonly scribeCode?: string
  readonly normalised?: Readonly<Record<string, unknown>>
}

const folder = new URL('../../../../fixtures/settings/', import.meta.url)
const bytesOf = (file: string) => new Uint8Array(readFileSync(new URL(file, folder)))
const cases = JSON.parse(readFileSync(new URL('cases.json', folder), 'utf8')) as readonly Case[]
const sha256 = (bytes: Uint8Array) => new Uint8Array(createHash('sha256').update(bytes).digest())
const read = ({ file, decimal }: Case) => readSettings(bytesOf(file), decimal ? { decimal } : {})

describe('the list of cases', () => {
  it('names every file of the folder once', () => {
    const files = ['json', 'csv'].flatMap(form => readdirSync(new URL(form, folder)).map(file => `${form}/${file}`)).sort()
    expect(cases.map(each => each.file).sort()).toEqual(files)
  })

  it('has at least one file for every error code', () => {
    const seen = new Set(cases.flatMap(each => each.errors ?? []).map(error => error.code))
    expect(formatErrorCodes.filter(code => !seen.has(code))).toEqual([])
  })
})

describe('files that are refused', () => {
  for (const each of cases.filter(one => one.errors)) {
    it(`${each.file}: ${each.what}`, () => {
      const outcome = read(each)
      if (outcome.ok) return expect.unreachable('the file was read')
      const told = outcome.errors.map(({ code, at, line, column, meant }) => ({ code, at, line, column, meant }))
      expect(told).toEqual(each.errors?.map(({ code, at, line, column, meant }) => ({ code, at, line, column, meant })))
      expect(outcome.more).toBe(each.more ?? 0)
    })
  }

  it('say what would be right, in a sentence of its own', () => {
    for (const each of cases.filter(one => one.errors)) {
      const outcome = read(each)
      for (const error of outcome.ok ? [] : outcome.errors) {
        expect(error.message).toMatch(/^[^\n]{12,400}\.$/)
        expect([...error.value ?? ''].length).toBeLessThanOrEqual(80)
      }
    }
  })
})

describe('files that are read', () => {
  for (const each of cases.filter(one => one.contentHash)) {
    it(`${each.file}: ${each.what}`, () => {
      const outcome = read(each)
      if (!outcome.ok) return expect(outcome.errors).toEqual([])
      const { contentHash, scribeCode } = hashesOf(outcome.value.content, sha256)
      expect({ contentHash, scribeCode }).toEqual({ contentHash: each.contentHash, scribeCode: each.scribeCode })
      expect(outcome.value.normalised).toMatchObject({ form: each.form, ...each.normalised })
    })
  }
})
