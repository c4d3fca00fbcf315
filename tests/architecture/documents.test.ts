import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { sourceText } from '../support/source-tree'

const root = fileURLToPath(new URL('../..', import.meta.url))

/** `tests/…` “its words”: a test that a document names. */
function testsNamedIn(document: string): { file: string, name: string }[] {
  return [...sourceText(document).matchAll(/`(tests\/[\w./-]+)` “([^”]+)”/g)].map(match => ({ file: match[1] ?? '', name: match[2] ?? '' }))
}

/** Names of `it` and `test` as they are written in a file; quotes that the file had to escape read plain. */
function namesIn(file: string): Set<string> {
  const text = sourceText(file)
  return new Set([...text.matchAll(/\b(?:it|test)(?:\.each\([^\n]*\))?\(\s*'((?:[^'\\]|\\.)*)'/g)].map(match => (match[1] ?? '').replaceAll(/\\(.)/g, '$1')))
}

describe('docs/electronic-records.md', () => {
  const named = testsNamedIn('docs/electronic-records.md')

  it('names tests, and each of them is there by its very words', () => {
    expect(named.length).toBeGreaterThan(15)
    const missing = named.filter(({ file, name }) => !existsSync(`${root}/${file}`) || !namesIn(file).has(name))
    expect(missing).toEqual([])
  })

  it('shows every row of its tables by a test, and names no other document', () => {
    const rows = sourceText('docs/electronic-records.md').split('\n').filter(line => line.startsWith('| ') && !line.startsWith('| ---') && !line.startsWith('| what it asks'))
    expect(rows.length).toBeGreaterThan(10)
    expect(rows.filter(row => !/`tests\/[\w./-]+` “[^”]+” ?\|$/.test(row.trim()) && !/”; `tests\//.test(row))).toEqual([])
  })

  it('leaves it to the user’s quality unit whether it applies and suffices', () => {
    expect(sourceText('docs/electronic-records.md').replaceAll('\n', ' ')).toMatch(/is for the user's own quality unit to decide/)
  })
})
