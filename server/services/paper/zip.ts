import { Zip, ZipDeflate, ZipPassThrough } from 'fflate'

export interface ZipFile { readonly name: string, readonly bytes: Buffer, readonly packed: boolean }

/** A ZIP of the files, in their order, part by part. Names are UTF-8; `at` stands as the time of each. */
export function* zipOf(files: Iterable<ZipFile>, at: string): Generator<Buffer> {
  const parts: Buffer[] = []
  let failed: Error | null = null
  const zip = new Zip((error, part) => {
    if (error) failed = error
    else parts.push(Buffer.from(part.buffer, part.byteOffset, part.byteLength))
  })
  for (const { name, bytes, packed } of files) {
    const entry = packed ? new ZipPassThrough(name) : new ZipDeflate(name, { level: 6 })
    entry.mtime = new Date(at)
    zip.add(entry)
    entry.push(bytes, true)
    if (failed) throw failed
    yield* parts.splice(0)
  }
  zip.end()
  if (failed) throw failed
  yield* parts.splice(0)
}
