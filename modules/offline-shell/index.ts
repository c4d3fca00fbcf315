import { createHash } from 'node:crypto'
import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { defineNuxtModule } from 'nuxt/kit'
import { shellFiles, type BuiltFile } from './files'

const source = fileURLToPath(new URL('./worker.mjs', import.meta.url))

/**
 * Writes /service-worker.js beside the built files: the worker with the list of what the swap pages are made of. The release
 * is named by that list and the bytes behind it, the build's own id among them: each build has a worker of its own. Nothing in
 * development.
 */
export default defineNuxtModule({
  meta: { name: 'offline-shell' },
  setup(_options, nuxt) {
    if (nuxt.options.dev) return
    let files: string[] = []
    nuxt.hook('build:manifest', (manifest) => { files = shellFiles(manifest as Record<string, BuiltFile>) })
    nuxt.hook('nitro:build:public-assets', ({ options }) => {
      if (files.length === 0) throw new Error('The builder named no file of the swap pages: there would be nothing to keep for a reload without reception.')
      const { buildAssetsDir } = nuxt.options.app
      const base = `/${buildAssetsDir.replaceAll(/^\/|\/$/g, '')}/`
      const paths = [...files.map(file => base + file), '/favicon.svg', `${base}builds/meta/${nuxt.options.buildId}.json`]
      const hash = createHash('sha256')
      for (const path of paths) hash.update(path).update(readFileSync(join(options.output.publicDir, path)))
      const release = hash.digest('hex').slice(0, 16)
      writeFileSync(join(options.output.publicDir, 'service-worker.js'), `const shell = ${JSON.stringify({ release, files: paths })}\n${readFileSync(source, 'utf8')}`)
    })
  },
})
