import { Zip, ZipDeflate, ZipPassThrough } from 'fflate'

export interface ZipFile { readonly name: string, readonly bytes: Buffer, /** Packed already: to pack it again takes time for nothing. */ readonly packed: boolean }

/** A ZIP that is written as it grows: `add` and `end` answer what is to be sent next. `at` stands as the time of each file. */
export class GrowingZip {
  private readonly parts: Buffer[] = []
  private failed: Error | null = null
  private readonly zip = new Zip((error, part) => {
    if (error) this.failed = error
    else this.parts.push(Buffer.from(part.buffer, part.byteOffset, part.byteLength))
  })

  constructor(private readonly at: string) {}

  add({ name, bytes, packed }: ZipFile): Buffer {
    const entry = packed ? new ZipPassThrough(name) : new ZipDeflate(name, { level: 6 })
    entry.mtime = new Date(this.at)
    this.zip.add(entry)
    entry.push(bytes, true)
    return this.taken()
  }

  end(): Buffer {
    this.zip.end()
    return this.taken()
  }

  private taken(): Buffer {
    if (this.failed) throw this.failed
    return Buffer.concat(this.parts.splice(0))
  }
}

/** The files in one ZIP, in their order. */
export function zipOf(files: Iterable<ZipFile>, at: string): Buffer {
  const zip = new GrowingZip(at)
  return Buffer.concat([...Array.from(files, file => zip.add(file)), zip.end()])
}
