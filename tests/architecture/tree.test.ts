import { describe, expect, it } from 'vitest'
import { routes } from '../../shared/api/routes'
import { sourceFiles, sourceText } from '../support/source-tree'

/** `server/api/sites/[id].patch.ts` -> `PATCH /api/sites/:id`. */
function routeOf(file: string): string {
  const match = /^server\/api\/(.+)\.(get|post|patch|put|delete)\.ts$/.exec(file)
  if (!match) return `not a handler's name: ${file}`
  const path = (match[1] ?? '').replace(/\/index$/, '').replace(/\[([^\]]+)\]/g, ':$1')
  return `${(match[2] ?? '').toUpperCase()} /api/${path}`
}

/** The one handler without a route: it answers 404 to what no route took. */
const handlers = () => sourceFiles('server/api').filter(file => file !== 'server/api/[...].ts')

describe('declared routes', () => {
  it('every handler is in the table, and every route of the table has a handler', () => {
    expect(handlers().map(routeOf).sort()).toEqual(Object.keys(routes).sort())
  })

  it('every handler goes through the wrapper, for the route that its file name says', () => {
    const wrong = handlers().filter(file => !sourceText(file).includes(`export default defineRoute('${routeOf(file)}'`))
    expect(wrong).toEqual([])
  })
})

describe('the tree', () => {
  it('every module of shared/ that computes has a test', () => {
    const tests = sourceFiles('tests/unit/shared').map(sourceText).join('\n')
    const wrong = sourceFiles('shared')
      .filter(file => !file.startsWith('shared/api/') && /^export (async )?function/m.test(sourceText(file)))
      .filter(file => !tests.includes(`/${file.replace(/\.ts$/, '')}'`))
    expect(wrong).toEqual([])
  })

  it('does without the framework features that later fixes concern', () => {
    const files = [...sourceFiles('components'), ...sourceFiles('pages'), ...sourceFiles('layouts')]
    expect(files.filter(file => file.endsWith('.server.vue'))).toEqual([])
    expect(files.filter(file => /<NoScript|<NuxtIsland|v-html/.test(sourceText(file)))).toEqual([])
    expect(sourceText('nuxt.config.ts')).not.toMatch(/runtimeCompiler|componentIslands|routeRules/)
  })

  it('keeps handlers short and files readable', () => {
    const lines = (file: string) => sourceText(file).split('\n').length - 1
    expect(sourceFiles('server/api').filter(file => lines(file) > 40)).toEqual([])
    const reasons: Record<string, string> = {
      'server/database/migrations/0001-first.ts': 'SQL of one migration, never edited once landed',
    }
    const long = ['shared', 'server', 'components', 'pages', 'composables', 'stores', 'utils'].flatMap(sourceFiles)
      .filter(file => lines(file) > 300 && !(file in reasons))
    expect(long).toEqual([])
  })
})
