import { Unzip, UnzipInflate, type UnzipFile } from 'fflate'
import { bytesInWords, mostBytesOfAll, mostBytesOfFile, mostFiles } from './limits'

export interface NamedBytes { readonly name: string, readonly bytes: Uint8Array }
export interface Unpacked {
  readonly files: readonly NamedBytes[]
  /** What was left behind, each with its reason. */
  readonly left: readonly { readonly name: string, readonly why: string }[]
}

const step = 64 * 1024

export function isZip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x50 && bytes[1] === 0x4b && (bytes[2] === 3 || bytes[2] === 5)
}

/** Folders, and what file managers put beside the files, are no settings. */
function isBeside(name: string): boolean {
  const last = name.split('/').at(-1) ?? ''
  return last === '' || last.startsWith('.') || name.startsWith('__MACOSX/')
}

function joined(chunks: readonly Uint8Array[], size: number): Uint8Array {
  const whole = new Uint8Array(size)
  let at = 0
  for (const chunk of chunks) {
    whole.set(chunk, at)
    at += chunk.length
  }
  return whole
}

/**
 * The files of a ZIP. Sizes are counted while unpacking, because the sizes written in a ZIP may lie; a file that grows
 * beyond its limit is dropped where it passes it.
 */
export function unpack(zip: Uint8Array, room: { readonly files: number, readonly bytes: number } = { files: mostFiles, bytes: mostBytesOfAll }): Unpacked {
  const files: NamedBytes[] = []
  const left: { name: string, why: string }[] = []
  let total = 0
  let begun = 0

  const take = (file: UnzipFile) => {
    if (isBeside(file.name)) return
    if (begun >= room.files) {
      left.push({ name: file.name, why: `beyond ${mostFiles} files` })
      return
    }
    begun += 1
    const chunks: Uint8Array[] = []
    let size = 0
    let stopped = false
    const stop = (why: string) => {
      if (stopped) return
      stopped = true
      total -= size
      begun -= 1
      left.push({ name: file.name, why })
    }
    file.ondata = (error, chunk, final) => {
      if (stopped) return
      if (error) return stop('damaged inside the ZIP')
      size += chunk.length
      total += chunk.length
      if (size > mostBytesOfFile) return stop(`larger than ${bytesInWords(mostBytesOfFile)}`)
      if (total > room.bytes) return stop(`beyond ${bytesInWords(mostBytesOfAll)} in all`)
      chunks.push(chunk)
      if (final) files.push({ name: file.name, bytes: joined(chunks, size) })
    }
    file.start()
  }

  const reader = new Unzip(take)
  reader.register(UnzipInflate)
  for (let at = 0; at < zip.length; at += step) reader.push(zip.subarray(at, at + step), at + step >= zip.length)
  return { files, left }
}
