import { defineNuxtModule } from 'nuxt/kit'
import { routes } from '../shared/api/routes'

/** Answers 404 to what is in no table; the only handler that stands for itself. */
const catchAll = '/api/**'
/** Of the sign-in library: they would read and end sessions past the table. */
const unwanted = new Set(['/api/_auth/session'])

/**
 * Refuses to build when a handler under /api is not in the table of routes, a module's handler too, or when a route of the
 * table has no handler: who may call is declared in one place, and forgetting it fails closed.
 */
export default defineNuxtModule({
  meta: { name: 'route-table' },
  setup(_options, nuxt) {
    nuxt.hook('nitro:init', (nitro) => {
      nitro.options.handlers = nitro.options.handlers.filter(({ route }) => route === undefined || !unwanted.has(route))
      nitro.hooks.hook('build:before', () => {
        const faults = routeFaults([...nitro.scannedHandlers, ...nitro.options.handlers])
        if (faults.length > 0) throw new Error(`The table of routes and the handlers disagree:\n${faults.join('\n')}`)
      })
    })
  },
})

interface Handler { readonly route?: string, readonly method?: string, readonly middleware?: boolean }

/** Every disagreement between the handlers and the table, one line each. */
export function routeFaults(handlers: readonly Handler[], table: readonly string[] = Object.keys(routes)): string[] {
  const served = handlers
    .filter(({ route, middleware }) => route?.startsWith('/api') === true && middleware !== true && route !== catchAll)
    .map(({ route, method }) => `${(method ?? 'ANY').toUpperCase()} ${route}`)
  return [
    ...served.filter(name => !table.includes(name)).map(name => `  ${name} has a handler and is not in the table`),
    ...table.filter(name => !served.includes(name)).map(name => `  ${name} is in the table and has no handler`),
  ]
}
