import { ed25519 } from '@noble/curves/ed25519.js'
import fc from 'fast-check'
import { createPrivateKey, sign as nodeSign } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { bytesOfBase64, sameBytes, toBase64 } from '../../../../shared/trail/bytes'
import { CheckpointError, checkpointBody, formatCheckpoint, formatVerifierKey, keyId, openCheckpoint, parseCheckpoint, parseVerifierKey, type VerifierKey } from '../../../../shared/trail/checkpoint'
import { bytes, hex, sha256 } from '../../../support/merkle'

const seed = sha256(new TextEncoder().encode('a seed for tests only'))
const key: VerifierKey = { name: 'witnessmark/tests', publicKey: ed25519.getPublicKey(seed) }
const sign = (message: Uint8Array) => ed25519.sign(message, seed)
const checkpoint = { origin: 'witnessmark/tests', size: 4711, root: sha256(new TextEncoder().encode('a root')) }
const note = formatCheckpoint(checkpoint, key, sign)

const codeOf = (work: () => unknown): string => {
  try {
    work()
  }
  catch (error) {
    if (error instanceof CheckpointError) return error.code
    throw error
  }
  return 'none'
}

describe('Ed25519 as RFC 8032, section 7.1 has it', () => {
  const rows = [
    ['TEST 1', '9d61b19deffd5a60ba844af492ec2cc44449c5697b326919703bac031cae7f60', 'd75a980182b10ab7d54bfed3c964073a0ee172f3daa62325af021a68f707511a', '',
      'e5564300c360ac729086e2cc806e828a84877f1eb8e5d974d873e065224901555fb8821590a33bacc61e39701cf9b46bd25bf5f0595bbe24655141438e7a100b'],
    ['TEST 2', '4ccd089b28ff96da9db6c346ec114e0f5b8a319f35aba624da8cf6ed4fb8a6fb', '3d4017c3e843895a92b70aa74d1b7ebc9c982ccf2ec4968cc0cd55f12af4660c', '72',
      '92a009a9f0d4cab8720e820b5f642540a2b27b5416503f8fb3762223ebdb69da085ac1e43e15996e458f3613d0f11d8c387b2eaeb4302aeeb00d291612bb0c00'],
    ['TEST 3', 'c5aa8df43f9f837bedb7442f31dcb7b166d38535076f094b85ce3a2e0b4458f7', 'fc51cd8e6218a1a38da47ed00230f0580816ed13ba3303ac5deb911548908025', 'af82',
      '6291d657deec24024827e69c3abe01a30ce548a284743a445e3680d7db5ac3ac18ff9b538d16f290ae67f760984dc6594a7c15e9716ed28dc027beceea1ec40a'],
  ] as const
  it.each(rows)('%s', (_, secret, publicKey, message, signature) => {
    expect(hex(ed25519.getPublicKey(bytes(secret)))).toBe(publicKey)
    expect(hex(ed25519.sign(bytes(message), bytes(secret)))).toBe(signature)
    // What the vault signs with: the same key as Node knows it (RFC 8410, section 7: a fixed head before the 32 bytes).
    const node = createPrivateKey({ key: Buffer.from(`302e020100300506032b657004220420${secret}`, 'hex'), format: 'der', type: 'pkcs8' })
    expect(nodeSign(null, bytes(message), node).toString('hex')).toBe(signature)
  })
})

describe('a verifier key', () => {
  it('is read and written as signed-note has it', () => {
    // The key of the worked example in the documentation of the signed note format; from memory, and its id proves it.
    const text = 'PeterNeumann+c74f20a3+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW'
    const read = parseVerifierKey(text)
    expect(read.name).toBe('PeterNeumann')
    expect(hex(keyId(read))).toBe('c74f20a3')
    expect(formatVerifierKey(read)).toBe(text)
  })
  it('comes back as it went', () => expect(parseVerifierKey(formatVerifierKey(key))).toEqual(key))
  it.each([
    ['nothing', ''],
    ['another id', formatVerifierKey(key).replace(/\+[0-9a-f]{8}\+/, '+00000000+')],
    ['a letter less', formatVerifierKey(key).slice(0, -1)],
    ['another algorithm', `x+00000000+${toBase64(new Uint8Array([4, ...key.publicKey]))}`],
    ['two lines', `${formatVerifierKey(key)}\nmore`],
  ])('is refused: %s', (_, text) => expect(codeOf(() => parseVerifierKey(text))).toBe('key-unreadable'))
})

describe('a checkpoint', () => {
  it('has three lines, an empty one, and the signature', () => {
    expect(note).toBe(`witnessmark/tests\n4711\n${Buffer.from(checkpoint.root).toString('base64')}\n\n— witnessmark/tests ${
      Buffer.concat([keyId(key), sign(new TextEncoder().encode(checkpointBody(checkpoint)))]).toString('base64')}\n`)
  })
  it('comes back as it went, for any size and root', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 2 ** 50 }), fc.uint8Array({ minLength: 32, maxLength: 32 }), (size, root) => {
      const given = { origin: 'a/b', size, root }
      const read = openCheckpoint(formatCheckpoint(given, key, sign), key)
      expect({ ...read, root: hex(read.root) }).toEqual({ ...given, root: hex(root) })
    }), { numRuns: 25 })
  })
  it('may be pasted with other line ends and space around it', () => {
    expect(openCheckpoint(`\r\n${note.replaceAll('\n', '\r\n')}  `, key).size).toBe(4711)
  })
  it('fails on every single bit of its signature', () => {
    const encoded = note.trimEnd().split(' ').at(-1)!
    const signature = bytesOfBase64(encoded)!
    for (let bit = 0; bit < signature.length * 8; bit += 1) {
      const flipped = signature.map((byte, i) => i === bit >> 3 ? byte ^ (1 << (bit & 7)) : byte)
      // The first four bytes name the key: without them it bears no signature of ours.
      expect(codeOf(() => openCheckpoint(note.replace(encoded, toBase64(flipped)), key))).toBe(bit < 32 ? 'checkpoint-unsigned' : 'checkpoint-signature')
    }
  })
  it.each([
    ['another size', note.replace('\n4711\n', '\n4712\n')],
    ['another origin', note.replace('witnessmark/tests\n', 'witnessmark/other\n')],
    ['another root', note.replace(toBase64(checkpoint.root), toBase64(sha256(checkpoint.root)))],
  ])('fails with %s', (_, altered) => expect(codeOf(() => openCheckpoint(altered, key))).toBe('checkpoint-signature'))
  it('fails by a key of the same name that did not sign', () => {
    const other = { name: key.name, publicKey: ed25519.getPublicKey(sha256(seed)) }
    expect(codeOf(() => openCheckpoint(note, other))).toBe('checkpoint-unsigned')
  })
  it('is read among signatures of others, unknown ones left aside', () => {
    const witness = `— elsewhere.example ${toBase64(new Uint8Array(72))}\n`
    expect(openCheckpoint(note + witness, key).size).toBe(4711)
    expect(codeOf(() => openCheckpoint(`${checkpointBody(checkpoint)}\n${witness}`, key))).toBe('checkpoint-unsigned')
  })
  it.each([
    ['nothing', ''],
    ['a size that is none', note.replace('4711', '04711')],
    ['a size below zero', note.replace('4711', '-1')],
    ['a root of 31 bytes', note.replace(toBase64(checkpoint.root), toBase64(checkpoint.root.subarray(1)))],
    ['a line more', note.replace('\n4711\n', '\n4711\nmore\n')],
    ['a signature without a dash', note.replace('— ', '- ')],
    ['words after it', `${note}\nand more`],
  ])('cannot be read: %s', (_, text) => expect(codeOf(() => parseCheckpoint(text))).toBe('checkpoint-unreadable'))
  it('cannot be read where a signature is no more than the id of a key', () => {
    expect(codeOf(() => parseCheckpoint(`${checkpointBody(checkpoint)}\n— ${key.name} ${toBase64(keyId(key))}\n`))).toBe('checkpoint-unreadable')
  })
  it('is not signed by a key for which everything is signed', () => {
    // The neutral point as key and as R, and S = 0: the equation R + k·A = S·B of RFC 8032, section 5.1.7, holds for any message. A key of small order is refused for it.
    const neutral = new Uint8Array(32)
    neutral[0] = 1
    const anybody: VerifierKey = { name: key.name, publicKey: neutral }
    expect(codeOf(() => openCheckpoint(formatCheckpoint(checkpoint, anybody, () => new Uint8Array([...neutral, ...new Uint8Array(32)])), anybody))).toBe('checkpoint-signature')
  })
  it('without a signature is read, and not believed', () => {
    expect(parseCheckpoint(checkpointBody(checkpoint)).size).toBe(4711)
    expect(codeOf(() => openCheckpoint(checkpointBody(checkpoint), key))).toBe('checkpoint-unsigned')
  })
})

describe('base 64', () => {
  // RFC 4648, section 10.
  it.each([['', ''], ['f', 'Zg=='], ['fo', 'Zm8='], ['foo', 'Zm9v'], ['foob', 'Zm9vYg=='], ['fooba', 'Zm9vYmE='], ['foobar', 'Zm9vYmFy']])('%s is %s', (text, encoded) => {
    expect(toBase64(new TextEncoder().encode(text))).toBe(encoded)
    expect(Buffer.from(bytesOfBase64(encoded)!).toString()).toBe(text)
  })
  it.each(['Zg', 'Zg=', 'Zh==', 'Zm9=', 'Z m8=', 'Zm8=\n', 'Zm8_'])('refuses %s', text => expect(bytesOfBase64(text)).toBeNull())
  it('comes back as it went', () => {
    fc.assert(fc.property(fc.uint8Array({ maxLength: 100 }), given => sameBytes(bytesOfBase64(toBase64(given))!, given)))
  })
})
