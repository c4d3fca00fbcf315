/** One file of the browser's part, as the builder's manifest has it; paths are relative to the folder of hashed files. */
export interface BuiltFile {
  readonly file: string
  readonly src?: string
  readonly isEntry?: boolean
  readonly imports?: readonly string[]
  readonly css?: readonly string[]
  readonly assets?: readonly string[]
}

/** Parts that a swap page is made of; what they import comes by itself. */
const wanted = [/^pages\/swaps\//, /^layouts\/default\.vue$/, /^error\.vue$/]

/** Every hashed file that the swap pages need without reception: the entry, those pages, and all that they import at once. */
export function shellFiles(manifest: Readonly<Record<string, BuiltFile>>): string[] {
  const names = Object.keys(manifest).filter(name => manifest[name]?.isEntry || wanted.some(part => part.test(manifest[name]?.src ?? name)))
  const reached = new Set<string>()
  for (let next = names.pop(); next !== undefined; next = names.pop()) {
    if (reached.has(next)) continue
    reached.add(next)
    names.push(...manifest[next]?.imports ?? [])
  }
  const files = [...reached].flatMap((name) => {
    const { file, css = [], assets = [] } = manifest[name] ?? { file: '' }
    return [file, ...css, ...assets]
  })
  // A browser with service workers reads the newer form of a font.
  return [...new Set(files)].filter(file => file !== '' && !file.endsWith('.woff')).sort()
}
