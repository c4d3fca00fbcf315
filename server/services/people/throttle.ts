import { createHash } from 'node:crypto'
import { RateLimiterRes, RateLimiterSQLite } from 'rate-limiter-flexible'
import { Refusal } from '#shared/errors/refusal'
import type { Vault } from '#server/database/client'

/** Failures that are let through in a quarter of an hour, by account and by peer address. */
export const throttleLimits = { account: 10, peer: 60, seconds: 15 * 60 } as const

type Kind = 'account' | 'peer'
const made = new WeakMap<Vault, Record<Kind, RateLimiterSQLite>>()

function limiters(vault: Vault): Record<Kind, RateLimiterSQLite> {
  const known = made.get(vault)
  if (known !== undefined) return known
  const limiter = (kind: Kind) => new RateLimiterSQLite({
    storeClient: vault.sqlite, storeType: 'better-sqlite3', tableName: 'throttle', tableCreated: true, clearExpiredByTimeout: true,
    keyPrefix: kind, points: throttleLimits[kind], duration: throttleLimits.seconds,
  })
  const both = { account: limiter('account'), peer: limiter('peer') }
  made.set(vault, both)
  return both
}

const accountKey = (email: string) => createHash('sha256').update(email.toLowerCase()).digest('hex')

/**
 * Runs an attempt that counts only if it fails. The point is taken before and given back after, so that a hundred attempts
 * at once get no further than ten one after another. Throws `throttled` with the seconds to wait.
 */
export async function throttled<Answer>(vault: Vault, email: string, peer: string, attempt: () => Promise<Answer | null>): Promise<Answer | null> {
  const keys: readonly (readonly [Kind, string])[] = [['account', accountKey(email)], ['peer', peer]]
  for (const [kind, key] of keys) await take(limiters(vault)[kind], key)
  const answer = await attempt()
  if (answer !== null) for (const [kind, key] of keys) await limiters(vault)[kind].reward(key, 1)
  return answer
}

async function take(limiter: RateLimiterSQLite, key: string): Promise<void> {
  try {
    await limiter.consume(key)
  }
  catch (refused) {
    if (!(refused instanceof RateLimiterRes)) throw refused
    const retryAfter = Math.max(1, Math.ceil(refused.msBeforeNext / 1000))
    throw new Refusal('throttled', `Too many failed attempts. Try again in ${Math.ceil(retryAfter / 60)} min.`, { retryAfter })
  }
}
