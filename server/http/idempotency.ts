import { createCipheriv, createDecipheriv, createHash, createHmac, hkdfSync, randomBytes } from 'node:crypto'
import { Refusal } from '#shared/errors/refusal'
import { instantOf } from '#server/database/clock'
import type { Actor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import { idempotencyQueries } from '#server/database/idempotency/queries'
import { Answer, FileAnswer } from './answer'

/*
 * A keyed POST is answered once: its answer is stored in the same transaction as what it did, for 24 hours. Requests are
 * compared by a keyed hash, since a body may hold a password, and answers are sealed, since one may hold a new token.
 */

export interface KeyedRequest { readonly key: string, readonly route: string, readonly fingerprint: string }

const day = 24 * 60 * 60 * 1000
const sealKey = (secret: string) => Buffer.from(hkdfSync('sha256', secret, '', 'witnessmark stored answer', 32))

/** What tells one request from another: method, address with query, and the body by its own hash. */
export function fingerprintOf(secret: string, method: string, url: string, body: string): string {
  return createHmac('sha256', sealKey(secret)).update(`${method} ${url}\n${body}`).digest('hex')
}

export interface Once { readonly answer: Answer | FileAnswer, readonly replayed: boolean }

/** Runs `work` in one write and keeps its answer under the key; a key known already gives the kept answer, another request under it 422. */
export function runOnce(vault: Vault, secret: string, actor: Actor, request: KeyedRequest | null, work: (write: Write) => Answer | FileAnswer): Once {
  return vault.write(actor, (write) => {
    if (request === null) return { answer: work(write), replayed: false }
    const queries = idempotencyQueries(vault.db)
    queries.forget.run({ before: instantOf(Date.parse(write.now) - day) })
    const id = { actor: `${actor.kind}:${'id' in actor ? actor.id : ''}`, keyHash: createHash('sha256').update(request.key).digest('hex') }
    const kept = queries.find.get(id)
    if (kept !== undefined) {
      if (kept.bodyHash !== request.fingerprint) throw new Refusal('key-reused', 'This Idempotency-Key stood with another request within the last 24 hours. Take a new one.')
      return { answer: opened(secret, kept.status, kept.answer), replayed: true }
    }
    const answer = work(write)
    queries.keep.run({ ...id, route: request.route, bodyHash: request.fingerprint, status: answer instanceof Answer ? answer.status : 200, answer: sealed(secret, answer), at: write.now })
    return { answer, replayed: false }
  })
}

function sealed(secret: string, answer: Answer | FileAnswer): string {
  const plain = answer instanceof Answer
    ? { json: answer.body ?? null }
    : { file: answer.body.toString('base64'), mediaType: answer.mediaType, name: answer.name }
  const iv = randomBytes(12)
  const cipher = createCipheriv('aes-256-gcm', sealKey(secret), iv)
  const text = Buffer.concat([cipher.update(JSON.stringify(plain), 'utf8'), cipher.final()])
  return Buffer.concat([iv, cipher.getAuthTag(), text]).toString('base64')
}

function opened(secret: string, status: number, text: string): Answer | FileAnswer {
  const bytes = Buffer.from(text, 'base64')
  const decipher = createDecipheriv('aes-256-gcm', sealKey(secret), bytes.subarray(0, 12))
  decipher.setAuthTag(bytes.subarray(12, 28))
  const plain = JSON.parse(Buffer.concat([decipher.update(bytes.subarray(28)), decipher.final()]).toString('utf8')) as
    { json: unknown } | { file: string, mediaType: string, name: string | null }
  return 'json' in plain ? new Answer(status, plain.json) : new FileAnswer(Buffer.from(plain.file, 'base64'), plain.mediaType, plain.name)
}
