import { strToU8, zipSync } from 'fflate'
import { describe, expect, it } from 'vitest'
import { mostBytesOfFile } from '../../../../utils/upload/limits'
import { isZip, unpack } from '../../../../utils/upload/unpack'

const text = (bytes: Uint8Array) => new TextDecoder().decode(bytes)

describe('unpack', () => {
  it('gives every file, packed or stored, byte for byte', () => {
    const zip = zipSync({ 'line-1/a.json': strToU8('{"a":1}'), 'b.csv': [strToU8('section,row'), { level: 0 }] })
    expect(isZip(zip)).toBe(true)
    const { files, left } = unpack(zip)
    expect(files.map(file => [file.name, text(file.bytes)])).toEqual([['line-1/a.json', '{"a":1}'], ['b.csv', 'section,row']])
    expect(left).toEqual([])
  })

  it('passes over folders and what file managers leave', () => {
    const zip = zipSync({ 'd/': new Uint8Array(), '__MACOSX/a.json': strToU8('x'), '.DS_Store': strToU8('x'), 'd/.hidden': strToU8('x'), 'a.json': strToU8('x') })
    expect(unpack(zip).files.map(file => file.name)).toEqual(['a.json'])
  })

  it('drops a file that unpacks beyond the limit and keeps the others', () => {
    const zip = zipSync({ 'bomb.json': new Uint8Array(mostBytesOfFile + 1), 'good.json': strToU8('{}') })
    const { files, left } = unpack(zip)
    expect(files.map(file => file.name)).toEqual(['good.json'])
    expect(left).toEqual([{ name: 'bomb.json', why: 'larger than 2.1 MB' }])
  })

  it('takes a file of exactly the limit', () => {
    expect(unpack(zipSync({ 'edge.json': new Uint8Array(mostBytesOfFile) })).files[0]?.bytes.length).toBe(mostBytesOfFile)
  })

  it('takes no more files than there is room for, and names the rest', () => {
    const zip = zipSync(Object.fromEntries([1, 2, 3].map(n => [`${n}.json`, strToU8('{}')])))
    const { files, left } = unpack(zip, { files: 2, bytes: 1000 })
    expect(files).toHaveLength(2)
    expect(left.map(one => one.name)).toEqual(['3.json'])
  })

  it('takes no more bytes in all than there is room for', () => {
    const zip = zipSync({ a: [new Uint8Array(600), { level: 0 }], b: [new Uint8Array(600), { level: 0 }], c: [new Uint8Array(300), { level: 0 }] })
    const { files, left } = unpack(zip, { files: 10, bytes: 1000 })
    expect(files.map(file => file.name)).toEqual(['a', 'c'])
    expect(left.map(one => one.name)).toEqual(['b'])
  })

  it('does not take other bytes for a ZIP', () => {
    expect(isZip(strToU8('{"schema"'))).toBe(false)
    expect(isZip(strToU8('PK is a text'))).toBe(false)
  })
})
