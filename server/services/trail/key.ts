import { createHash, createPrivateKey, createPublicKey, generateKeyPairSync, sign, type KeyObject } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { formatVerifierKey, type VerifierKey } from '#shared/trail/checkpoint'
import type { VaultActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { readSetting, writeSetting } from '#server/database/setting/queries'

/*
 * The key that signs checkpoints lies beside the database, so it keeps nobody out who holds the machine: only a checkpoint
 * kept elsewhere proves anything. It proves there that this vault said so.
 */

export interface TrailKey { readonly verifier: VerifierKey, readonly sign: (message: Uint8Array) => Uint8Array }

export const trailActor: VaultActor = { kind: 'vault', name: 'trail', sites: null, peer: '' }

const keys = new WeakMap<Vault, TrailKey>()

/** The key of this vault; made in the data folder where there is none. */
export function trailKeyOf(vault: Vault): TrailKey {
  const known = keys.get(vault)
  if (known !== undefined) return known
  const made = keyAt(join(vault.folder, 'trail-key.pem'))
  keys.set(vault, made)
  return made
}

function keyAt(path: string): TrailKey {
  if (!existsSync(path)) {
    const { privateKey } = generateKeyPairSync('ed25519')
    writeFileSync(path, privateKey.export({ format: 'pem', type: 'pkcs8' }), { mode: 0o600, flag: 'wx' })
  }
  const secret = createPrivateKey(readFileSync(path))
  const publicKey = rawPublicKey(secret)
  return { verifier: { name: nameOf(publicKey), publicKey }, sign: message => sign(null, message, secret) }
}

/** The 32 bytes of RFC 8032, section 5.1.5; a JSON Web Key has them as `x` (RFC 8037, section 2). */
function rawPublicKey(secret: KeyObject): Uint8Array {
  const { x } = createPublicKey(secret).export({ format: 'jwk' })
  if (x === undefined) throw new TypeError('trail-key.pem holds no Ed25519 key.')
  return new Uint8Array(Buffer.from(x, 'base64url'))
}

/** Tells vaults apart by their keys: a name that somebody chose would be chosen twice. */
const nameOf = (publicKey: Uint8Array) => `witnessmark/${createHash('sha256').update(publicKey).digest('hex').slice(0, 12)}`

/** Puts the key into the log where another stands there: from then on the log itself says whose signatures count. */
export function recordTrailKey(vault: Vault): void {
  const line = formatVerifierKey(trailKeyOf(vault).verifier)
  if (readSetting(vault, 'trail-key') === line) return
  vault.write(trailActor, (write) => { writeSetting(vault, write, 'trail-key', line) })
}
