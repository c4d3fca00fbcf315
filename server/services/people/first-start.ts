import { createHash, randomBytes, timingSafeEqual } from 'node:crypto'
import type { Logger } from 'pino'
import { CodedError } from '#shared/errors/coded'
import { Refusal } from '#shared/errors/refusal'
import type { VaultActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { insertPerson, personQueries, personState } from '#server/database/person/queries'
import { writeSetting } from '#server/database/setting/queries'
import { assertStrong, hashPassword } from './password'
import { plantOf } from './plant'

export const setUpActor: VaultActor = { kind: 'vault', name: 'set-up', sites: null, peer: '' }

/** Nobody is registered yet: whoever holds the set-up address becomes the first administrator. */
export const isUnclaimed = (vault: Vault): boolean => personQueries(vault.db).any.get() === undefined

const tokens = new WeakMap<Vault, string>()
const hashOf = (text: string) => createHash('sha256').update(text).digest()

export interface FirstAdmin { readonly name: string, readonly email: string, readonly password: string, readonly plant?: string }

/** Registers the first administrator; throws `set-up-done` when there is anybody already. Answers their id. */
export async function registerFirstAdmin(vault: Vault, { name, email, password, plant }: FirstAdmin): Promise<number> {
  assertStrong(password, [name, email])
  const passwordHash = await hashPassword(password, vault.scryptCost)
  return vault.write(setUpActor, (write) => {
    if (!isUnclaimed(vault)) throw new Refusal('set-up-done', 'The vault has its administrator. Sign in.')
    const person = insertPerson(vault.db, { name, email, roles: ['admin'], siteIds: [], passwordHash, passwordSetAt: write.now, madeAt: write.now })
    write.log({ act: 'person-registered', id: person.id, state: personState(person) })
    if (plant !== undefined) writeSetting(vault, write, 'plant', plant)
    write.log({ act: 'vault-set-up', id: 'vault', state: { plant: plantOf(vault), firstAdmin: person.id } })
    tokens.delete(vault)
    return person.id
  })
}

/** As registerFirstAdmin, for who shows the one-time token of the printed address. */
export async function setUp(vault: Vault, token: string, admin: FirstAdmin): Promise<number> {
  if (!isUnclaimed(vault)) throw new Refusal('set-up-done', 'The vault has its administrator. Sign in.')
  const expected = tokens.get(vault)
  if (expected === undefined || !timingSafeEqual(hashOf(expected), hashOf(token))) {
    throw new Refusal('set-up-token', 'This set-up address does not hold. The server prints the right one at each start until there is an administrator.')
  }
  return registerFirstAdmin(vault, admin)
}

/**
 * On an empty vault: registers the administrator that the environment names, else makes the one-time token and prints the
 * address. The token lives in this process only.
 */
export async function firstStart(vault: Vault, logger: Pick<Logger, 'info' | 'error'>, publicOrigin: string | null): Promise<void> {
  if (!isUnclaimed(vault)) return
  const { WITNESSMARK_ADMIN_EMAIL: email, WITNESSMARK_ADMIN_PASSWORD: password, PORT } = process.env
  if (email && password) {
    try {
      await registerFirstAdmin(vault, { name: email.replace(/@.*$/s, ''), email, password })
      logger.info({ email }, 'first administrator registered')
      return
    }
    catch (error) {
      if (!(error instanceof CodedError)) throw error
      logger.error({ code: error.code }, `WITNESSMARK_ADMIN_PASSWORD was not taken: ${error.message}`)
    }
  }
  logger.info(`Nobody is registered yet. Set up the vault at ${publicOrigin ?? `http://localhost:${PORT ?? '3000'}`}/set-up?token=${setUpToken(vault)}`)
}

/** The one-time token of this process, made when first asked for. */
export function setUpToken(vault: Vault): string {
  const known = tokens.get(vault) ?? randomBytes(24).toString('base64url')
  tokens.set(vault, known)
  return known
}
