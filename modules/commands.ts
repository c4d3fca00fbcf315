import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { defineNuxtModule } from 'nuxt/kit'
import { build } from 'vite'

/**
 * Bundles every command of server/commands into the built server: where only `.output` is deployed, `node
 * .output/server/commands/verify.mjs` runs, and finds the one dependency that holds machine code beside the server's own.
 */
export default defineNuxtModule({
  meta: { name: 'commands' },
  setup(_options, nuxt) {
    nuxt.hook('nitro:init', (nitro) => {
      if (!nuxt.options.dev) nitro.hooks.hook('compiled', () => bundleCommands(nuxt.options.rootDir, nitro.options.output.serverDir))
    })
  },
})

const compiled = ['better-sqlite3']

async function bundleCommands(root: string, serverDir: string): Promise<void> {
  const folder = join(root, 'server/commands')
  const names = readdirSync(folder).filter(name => name.endsWith('.ts')).map(name => name.replace(/\.ts$/, ''))
  await build({
    root, configFile: false, logLevel: 'error', publicDir: false,
    resolve: { alias: { '#server': join(root, 'server'), '#shared': join(root, 'shared') } },
    ssr: { target: 'node', noExternal: true, external: compiled },
    build: {
      ssr: true, target: 'node20', minify: false, emptyOutDir: true, outDir: join(serverDir, 'commands'),
      rollupOptions: { input: Object.fromEntries(names.map(name => [name, join(folder, `${name}.ts`)])), output: { entryFileNames: '[name].mjs', chunkFileNames: 'shared/[name].mjs' } },
    },
  })
}
