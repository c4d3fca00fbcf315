import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { StartError } from '#server/database/start-error'

const shortest = 32
const leastKinds = 10

/** The secret that seals cookies: as given, else the one kept in the data folder, made at the first start. Throws `secret-weak`. */
export function sessionSecret(folder: string, given: string | undefined): string {
  const path = join(folder, 'session-secret')
  if (given === undefined || given === '') {
    if (!existsSync(path)) writeFileSync(path, randomBytes(48).toString('base64url'), { mode: 0o600, flag: 'wx' })
    return assertStrongSecret(readFileSync(path, 'utf8').trim(), `${path} holds a weak secret. Delete the file; a new one is made at the next start, and everybody signs in again.`)
  }
  return assertStrongSecret(given, `NUXT_SESSION_PASSWORD is weak: it takes at least ${shortest} random characters. Leave it unset, and a strong one is made and kept in the data folder.`)
}

function assertStrongSecret(secret: string, message: string): string {
  if (secret.length < shortest || new Set(secret).size < leastKinds) throw new StartError('secret-weak', message)
  return secret
}
