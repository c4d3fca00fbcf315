import { inflateSync } from 'node:zlib'

/*
 * The fonts are shipped as WOFF 1.0 (W3C Recommendation, 13 December 2012): the tables of an OpenType font, each zlib-compressed
 * where that makes it shorter. Section 3: a header of 44 bytes. Section 4: for each table 20 bytes, tag, offset, compressed
 * length, length, checksum. What the PDF writer takes is the font that this was made from.
 */

const signature = 0x774f4646
const headerSize = 44
const entrySize = 20
const sfntHeaderSize = 12
const sfntEntrySize = 16

interface Table { readonly tag: Buffer, readonly checksum: number, readonly bytes: Buffer }

/** The OpenType font within a WOFF file. Throws RangeError where it is none. */
export function openTypeOf(woff: Buffer): Buffer {
  if (woff.length < headerSize || woff.readUInt32BE(0) !== signature) throw new RangeError('This is no WOFF 1.0 font.')
  const flavor = woff.readUInt32BE(4)
  const tables = Array.from({ length: woff.readUInt16BE(12) }, (_, index) => tableAt(woff, headerSize + index * entrySize))
  return written(flavor, tables)
}

function tableAt(woff: Buffer, at: number): Table {
  const [offset, packed, length] = [woff.readUInt32BE(at + 4), woff.readUInt32BE(at + 8), woff.readUInt32BE(at + 12)]
  const stored = woff.subarray(offset, offset + packed)
  const bytes = packed < length ? inflateSync(stored) : stored
  if (bytes.length !== length) throw new RangeError(`Table ${woff.toString('latin1', at, at + 4)} of the font has ${bytes.length} bytes and says ${length}.`)
  return { tag: woff.subarray(at, at + 4), checksum: woff.readUInt32BE(at + 16), bytes }
}

const padded = (length: number) => Math.ceil(length / 4) * 4

/** OpenType 1.9, "Table directory": the search fields follow from the number of tables; each table begins at a multiple of four. */
function written(flavor: number, tables: readonly Table[]): Buffer {
  const power = Math.floor(Math.log2(tables.length))
  const head = Buffer.alloc(sfntHeaderSize + tables.length * sfntEntrySize)
  head.writeUInt32BE(flavor, 0)
  head.writeUInt16BE(tables.length, 4)
  head.writeUInt16BE(2 ** power * sfntEntrySize, 6)
  head.writeUInt16BE(power, 8)
  head.writeUInt16BE((tables.length - 2 ** power) * sfntEntrySize, 10)
  let offset = head.length
  const bodies = tables.map(({ tag, checksum, bytes }, index) => {
    const at = sfntHeaderSize + index * sfntEntrySize
    tag.copy(head, at)
    head.writeUInt32BE(checksum, at + 4)
    head.writeUInt32BE(offset, at + 8)
    head.writeUInt32BE(bytes.length, at + 12)
    offset += padded(bytes.length)
    return Buffer.concat([bytes, Buffer.alloc(padded(bytes.length) - bytes.length)])
  })
  return Buffer.concat([head, ...bodies])
}
