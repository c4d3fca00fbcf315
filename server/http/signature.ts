import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { verifyOwnPassword } from '#server/services/people/sign-in'

/**
 * Takes the password out of the body and verifies it: name, time and meaning of a signed act stand in its own record
 * (21 CFR 11.50). Failures count like failed sign-ins.
 */
export async function assertSigned(vault: Vault, actor: Actor, body: unknown): Promise<Record<string, unknown>> {
  const { password, ...rest } = body as { password: string } & Record<string, unknown>
  if (actor.kind !== 'person' || actor.shared) throw new Refusal('signature', 'A shared account or a token cannot sign: sign in with your own.')
  const verdict = await verifyOwnPassword(vault, actor, password)
  if (verdict === 'none') throw new Refusal('signing-password', 'You have no password to sign with: set one first.')
  if (verdict === 'wrong') throw new Refusal('signature', 'The password is wrong; nothing was signed.')
  return rest
}
