import { existsSync, readFileSync, readdirSync } from 'node:fs'
import { dirname, join, normalize, relative } from 'node:path'
import { fileURLToPath } from 'node:url'

const root = fileURLToPath(new URL('../../', import.meta.url))

/** Source files below a folder of the project, as paths from its root; none where the folder is not there. */
export function sourceFiles(folder: string): string[] {
  const start = join(root, folder)
  if (!existsSync(start)) return []
  return readdirSync(start, { recursive: true, withFileTypes: true })
    .filter(entry => entry.isFile() && /\.(ts|vue|mjs)$/.test(entry.name))
    .map(entry => relative(root, join(entry.parentPath, entry.name)))
    .sort()
}

/** The text of a file of the project. */
export function sourceText(path: string): string {
  return readFileSync(join(root, path), 'utf8')
}

const statement = /(?:^|[\s;}])(?:import|export)\s[^'"`;]*?from\s*['"]([^'"]+)['"]|(?:^|[\s;}])import\s*['"]([^'"]+)['"]|import\(\s*['"]([^'"]+)['"]\s*\)/gm

/** What a file imports: paths from the root for the project's own, package names as they stand for others. */
export function importsOf(path: string): string[] {
  return [...sourceText(path).matchAll(statement)].map((match) => {
    const target = (match[1] ?? match[2] ?? match[3] ?? '').replace(/\?raw$/, '')
    if (target.startsWith('.')) return normalize(join(dirname(path), target))
    return target.replace(/^#(shared|server)\//, '$1/').replace(/^(~~|~|@)\//, '')
  })
}
