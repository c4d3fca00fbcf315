import { resolve } from 'node:path'
import { pathToFileURL } from 'node:url'
import { build } from 'vite'

/*
 * Builds the bench as the application is built, and runs it. The loader that scripts run by would give each inner function its
 * name anew whenever one is made, which the built application does not: it took as much as half of the rules' time.
 */

const outDir = 'node_modules/.cache/bench'
await build({
  configFile: false,
  logLevel: 'warn',
  publicDir: false,
  resolve: { alias: { '#shared': resolve('shared'), '#server': resolve('server') } },
  build: { ssr: 'bench/run.ts', target: 'node20', outDir, rollupOptions: { output: { entryFileNames: 'run.mjs' } } },
})
await import(pathToFileURL(resolve(outDir, 'run.mjs')).href)
