import { z } from 'zod'
import { idSchema, instantSchema } from './common'

const hash = z.string().regex(/^[0-9a-f]{64}$/).describe('SHA-256, lower-case hex')
const seqQuery = z.coerce.number().int().nonnegative()

export const proofQuery = z.strictObject({ entry: seqQuery, size: seqQuery.optional() })
export const proofAnswer = z.object({ entry: z.int(), size: z.int(), leafHash: hash, path: z.array(hash).describe('leaf to root, RFC 9162 2.1.3.1') })
export const consistencyQuery = z.strictObject({ from: seqQuery, to: seqQuery.optional() })
export const consistencyAnswer = z.object({ from: z.int(), to: z.int(), path: z.array(hash).describe('RFC 9162 2.1.4.1') })
export const keyAnswer = z.object({ name: z.string(), publicKey: hash.describe('Ed25519, lower-case hex'), verifierKey: z.string().describe('name+id+key, C2SP signed-note') })

/** One fault of the vault: the record it is in, and what is wrong with it. */
export const faultSchema = z.object({ record: z.string(), fault: z.string() })
export type Fault = z.infer<typeof faultSchema>
export const verificationSchema = z.object({
  id: idSchema, begunAt: instantSchema, endedAt: instantSchema, outcome: z.enum(['sound', 'damage', 'failed']),
  entries: z.int().describe('of the log'), rows: z.int().describe('records held against the log'), faults: z.int(), found: z.array(faultSchema).describe('the first hundred'),
})
export type Verification = z.infer<typeof verificationSchema>
export const trailState = z.object({
  size: z.int(), checkpoint: z.object({ size: z.int(), takenAt: instantSchema }).nullable().describe('the newest that was kept'),
  verifications: z.array(verificationSchema).describe('newest first'), verifying: z.boolean().describe('one runs now'),
})
export type TrailState = z.infer<typeof trailState>
