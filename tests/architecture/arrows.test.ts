import { describe, expect, it } from 'vitest'
import { importsOf, sourceFiles } from '../support/source-tree'

/*
 * Who may import whom. Each row: files below the folder may import only what the patterns name (paths from the root), the
 * folder itself always included. Exceptions are written here with their reason.
 */

const shared: Record<string, string[]> = {
  'shared/errors': [],
  'shared/units': ['shared/errors'],
  'shared/settings': ['shared/units', 'shared/errors'],
  'shared/motion': ['shared/settings', 'shared/units', 'shared/errors'],
  'shared/diff': ['shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
  'shared/checks': ['shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
  'shared/swap': ['shared/diff', 'shared/checks', 'shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
  'shared/pictures': ['shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
  'shared/sheet': ['shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
  'shared/trail': ['shared/diff', 'shared/checks', 'shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
  'shared/api': ['shared/swap', 'shared/diff', 'shared/checks', 'shared/motion', 'shared/settings', 'shared/units', 'shared/errors'],
}
const app = ['pages', 'layouts', 'middleware', 'components', 'composables', 'stores', 'utils', 'plugins']
const purePackages = new Set(['zod', 'decimal.js', 'papaparse', 'diff', '@noble/curves/ed25519.js', '@noble/hashes/sha2.js', '@noble/hashes/utils.js'])

describe('import arrows', () => {
  for (const [folder, allowed] of Object.entries(shared)) {
    it(`${folder} imports only ${allowed.join(', ') || 'itself'}`, () => {
      const wrong = sourceFiles(folder).flatMap(file => importsOf(file)
        .filter(target => target.startsWith('shared/') && ![folder, ...allowed].some(prefix => target.startsWith(`${prefix}/`)))
        .map(target => `${file} -> ${target}`))
      expect(wrong).toEqual([])
    })
  }

  it('shared/ imports nothing from outside but small pure libraries', () => {
    const wrong = sourceFiles('shared').flatMap(file => importsOf(file)
      .filter(target => !target.startsWith('shared/') && !purePackages.has(target))
      .map(target => `${file} -> ${target}`))
    expect(wrong).toEqual([])
  })

  it('the server never imports the application', () => {
    const wrong = sourceFiles('server').flatMap(file => importsOf(file)
      .filter(target => app.some(folder => target.startsWith(`${folder}/`)))
      .map(target => `${file} -> ${target}`))
    expect(wrong).toEqual([])
  })

  it('handlers import neither the database nor its library', () => {
    const wrong = sourceFiles('server/api').flatMap(file => importsOf(file)
      .filter(target => target.startsWith('server/database') || target.startsWith('drizzle-orm') || target === 'better-sqlite3')
      .map(target => `${file} -> ${target}`))
    expect(wrong).toEqual([])
  })

  it('the application never imports the server', () => {
    const wrong = app.flatMap(folder => sourceFiles(folder)).flatMap(file => importsOf(file)
      .filter(target => target.startsWith('server/'))
      .map(target => `${file} -> ${target}`))
    expect(wrong).toEqual([])
  })

  it('base components know no domain', () => {
    const domain = /#shared\/(settings|diff|checks|motion|trail)|shared\/(settings|diff|checks|motion|trail)/
    const wrong = sourceFiles('components/base').flatMap(file => importsOf(file).filter(target => domain.test(target)).map(target => `${file} -> ${target}`))
    expect(wrong).toEqual([])
  })
})
