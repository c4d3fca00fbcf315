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
      'tests/e2e/first-axis.test.ts': 'the day of a planner in one vault, each step on what the one before left',
    }
    const long = ['shared', 'server', 'components', 'pages', 'composables', 'stores', 'utils', 'tests'].flatMap(sourceFiles).filter(file => lines(file) > 300)
    expect(long.filter(file => !(file in reasons))).toEqual([])
    expect(Object.keys(reasons).filter(file => !long.includes(file)), 'reasons for files that are short by now').toEqual([])
  })
})

describe('templates', () => {
  /** As the framework names them: the folders, then the file, parts that repeat written once. */
  const nameOf = (file: string) => {
    const parts = file.replace(/^components\//, '').replace(/\.vue$/, '').split('/').map(part => part.replace(/(^|-)(\w)/g, (_, __, letter: string) => letter.toUpperCase()))
    return parts.reduce((name, part) => part.startsWith(name) ? part : name + part, '')
  }
  const known = new Set(['NuxtLayout', 'NuxtRouteAnnouncer', 'NuxtPage', 'NuxtLink', 'ClientOnly', 'Teleport', 'Transition', 'TransitionGroup', 'KeepAlive', 'Suspense', ...sourceFiles('components').filter(file => file.endsWith('.vue')).map(nameOf)])

  it('use only components that are there', () => {
    const wrong = ['components', 'pages', 'layouts'].flatMap(sourceFiles).concat('app.vue', 'error.vue').filter(file => file.endsWith('.vue')).flatMap((file) => {
      const text = sourceText(file)
      const imported = [...text.matchAll(/import\s+(?:type\s+)?(?:\{([^}]+)\}|(\w+))/g)].flatMap(match => (match[1] ?? match[2] ?? '').split(',').map(name => name.trim().replace(/^.* as /, '')))
      const template = /<template>[\s\S]*<\/template>/.exec(text)?.[0] ?? ''
      return [...template.matchAll(/<([A-Z]\w+)/g)].map(match => match[1] ?? '').filter(name => !known.has(name) && !imported.includes(name)).map(name => `${file}: ${name}`)
    })
    expect(wrong).toEqual([])
  })
})
