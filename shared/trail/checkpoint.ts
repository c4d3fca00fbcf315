import { ed25519 } from '@noble/curves/ed25519.js'
import { sha256 } from '@noble/hashes/sha2.js'
import { bytesToHex } from '@noble/hashes/utils.js'
import { CodedError } from '../errors/coded'
import { bytesOfBase64, sameBytes, toBase64 } from './bytes'
import type { Hash } from './tree'

/*
 * A checkpoint says how long the log is and what its root is, signed: the body of C2SP tlog-checkpoint in the envelope of
 * C2SP signed-note, with an Ed25519 signature (RFC 8032). Three lines, an empty line, one line a signature:
 *
 *     witnessmark/3f9a17c2
 *     4711
 *     q83vEjRWeJq83vEjRWeJq83vEjRWeJq83vEjRWeJq80=
 *
 *     — witnessmark/3f9a17c2 4pqr...
 */

export interface Checkpoint { readonly origin: string, readonly size: number, readonly root: Hash }
/** Name and public key; `id` is the first four bytes of SHA-256(name ‖ newline ‖ 1 ‖ key), as signed-note says for Ed25519. */
export interface VerifierKey { readonly name: string, readonly publicKey: Uint8Array }

export type CheckpointErrorCode = 'checkpoint-unreadable' | 'checkpoint-unsigned' | 'checkpoint-signature' | 'key-unreadable'
export class CheckpointError extends CodedError<CheckpointErrorCode> {}

const encoder = new TextEncoder()
/** The algorithm byte of Ed25519 in C2SP signed-note. */
const ed25519Kind = 1
const keyIdLength = 4
const hashLength = 32
const signatureMark = '\u2014 '

/** Four bytes that tell one key of a name from another; not a proof of anything. */
export function keyId({ name, publicKey }: VerifierKey): Uint8Array {
  return sha256(new Uint8Array([...encoder.encode(`${name}\n`), ed25519Kind, ...publicKey])).subarray(0, keyIdLength)
}

/** `name+id+key` on one line, as signed-note has verifier keys; `parseVerifierKey` is its inverse. */
export function formatVerifierKey(key: VerifierKey): string {
  return `${key.name}+${bytesToHex(keyId(key))}+${toBase64(new Uint8Array([ed25519Kind, ...key.publicKey]))}`
}

/** Throws CheckpointError 'key-unreadable' where form, algorithm or id do not fit. */
export function parseVerifierKey(text: string): VerifierKey {
  const [, name = '', id = '', encoded = ''] = /^([^\s+]+)\+([0-9a-f]{8})\+([A-Za-z0-9+/=]+)$/.exec(text.trim()) ?? []
  const bytes = bytesOfBase64(encoded)
  if (bytes === null || bytes.length !== hashLength + 1 || bytes[0] !== ed25519Kind) throw new CheckpointError('key-unreadable', 'A key reads name+id+key on one line, the key being an Ed25519 one.')
  const key = { name, publicKey: bytes.subarray(1) }
  if (bytesToHex(keyId(key)) !== id) throw new CheckpointError('key-unreadable', `The key does not fit its own id ${id}: a character may be missing.`)
  return key
}

/** The three lines that are signed. `size` is a whole number from 0. */
export const checkpointBody = ({ origin, size, root }: Checkpoint): string => `${origin}\n${size}\n${toBase64(root)}\n`

/** The whole note. `sign` answers the 64 bytes of an Ed25519 signature over what it is given. */
export function formatCheckpoint(checkpoint: Checkpoint, key: VerifierKey, sign: (message: Uint8Array) => Uint8Array): string {
  const body = checkpointBody(checkpoint)
  const signature = new Uint8Array([...keyId(key), ...sign(encoder.encode(body))])
  return `${body}\n${signatureMark}${key.name} ${toBase64(signature)}\n`
}

/** Reads a note without judging its signatures; line ends of another system and space around it are forgiven, for people paste it. */
export function parseCheckpoint(note: string): Checkpoint {
  return parts(note).checkpoint
}

/** Reads a note and insists that this key signed it. Throws CheckpointError and says which of the two failed. */
export function openCheckpoint(note: string, key: VerifierKey): Checkpoint {
  const { checkpoint, signatures } = parts(note)
  const own = signatures.filter(({ name, bytes }) => name === key.name && sameBytes(bytes.subarray(0, keyIdLength), keyId(key)))
  if (own.length === 0) throw new CheckpointError('checkpoint-unsigned', `The checkpoint bears no signature of ${key.name}.`, { key: key.name })
  const message = encoder.encode(checkpointBody(checkpoint))
  // zip215 off: one reading of the standard only, RFC 8032, section 5.1.7.
  const sound = own.every(({ bytes }) => bytes.length === keyIdLength + 64 && ed25519.verify(bytes.subarray(keyIdLength), message, key.publicKey, { zip215: false }))
  if (!sound) throw new CheckpointError('checkpoint-signature', `The signature of ${key.name} does not fit the checkpoint: text or signature was altered.`, { key: key.name })
  return checkpoint
}

interface Signature { readonly name: string, readonly bytes: Uint8Array }

function parts(note: string): { checkpoint: Checkpoint, signatures: readonly Signature[] } {
  const [body = '', signed = '', ...more] = note.replaceAll('\r\n', '\n').trim().split('\n\n')
  const [origin = '', size = '', root = '', ...extensions] = body.split('\n')
  const rootBytes = bytesOfBase64(root)
  if (origin === '' || !/^(0|[1-9]\d{0,15})$/.test(size) || rootBytes?.length !== hashLength || extensions.length > 0 || more.length > 0) {
    throw new CheckpointError('checkpoint-unreadable', 'A checkpoint has three lines (origin, size, root), an empty line, and its signatures.')
  }
  return { checkpoint: { origin, size: Number(size), root: rootBytes }, signatures: signed.split('\n').filter(line => line !== '').map(signatureOf) }
}

function signatureOf(line: string): Signature {
  const [, name = '', encoded = ''] = /^\u2014 (\S+) ([A-Za-z0-9+/=]+)$/.exec(line) ?? []
  const bytes = bytesOfBase64(encoded)
  if (bytes === null || bytes.length <= keyIdLength) throw new CheckpointError('checkpoint-unreadable', 'A signature line reads: dash, name, signature.', { line })
  return { name, bytes }
}
