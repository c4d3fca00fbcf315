import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { openTypeOf } from './woff'

/** Inter says words, JetBrains Mono says values, tags, serials, codes; two weights each, as on the screens. */
export const faces = ['sans', 'sans-bold', 'mono', 'mono-bold'] as const
export type Face = (typeof faces)[number]

/** The shipped fonts come cut by script; a text takes each sign from the first that has it. */
export const scripts = ['latin', 'latin-ext', 'greek', 'cyrillic', 'vietnamese', 'greek-ext', 'cyrillic-ext'] as const
export type Script = (typeof scripts)[number]
/** JetBrains Mono has none of these. */
const sansOnly: readonly Script[] = ['greek-ext']

export const scriptsOf = (face: Face): readonly Script[] => (face.startsWith('mono') ? scripts.filter(script => !sansOnly.includes(script)) : scripts)

const read = new Map<string, Buffer>()

/** The OpenType font of a face and script, read once a process. Both families are under the SIL Open Font License 1.1 (public/licenses). */
export function fontFile(face: Face, script: Script): Buffer {
  const family = face.startsWith('mono') ? 'jetbrains-mono' : 'inter'
  const path = `@fontsource/${family}/files/${family}-${script}-${face.endsWith('bold') ? 600 : 400}-normal.woff`
  // Found when it is asked for: the built server knows where it lies only after all its modules have begun.
  const known = read.get(path) ?? openTypeOf(readFileSync(createRequire(import.meta.url).resolve(path)))
  read.set(path, known)
  return known
}
