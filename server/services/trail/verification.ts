import type { TrailState, Verification } from '#shared/api/trail'
import { Refusal } from '#shared/errors/refusal'
import type { Vault, Write } from '#server/database/client'
import { logSize } from '#server/database/log/nodes'
import { firstInstant } from '#server/database/log/queries'
import type { VerificationRow } from '#server/database/schema'
import { trailQueries } from '#server/database/trail/queries'
import { raiseDamage } from '../findings/causes'
import { tellVault } from '../letters/queue'
import { verifyVault, type Verified } from '../verify/verify'
import { trailActor } from './key'
import { takeCheckpoint } from './trail'

const hour = 3_600_000
/** One a day; health turns red where the newest is older by two hours than that, or has found damage. */
const every = 24 * hour
const latest = 26 * hour

const running = new WeakSet<Vault>()

/** What the trail page heads with. */
export function trailState(vault: Vault): TrailState {
  const newest = trailQueries(vault.db).newestCheckpoint.get()
  return {
    size: logSize(vault.db), verifying: running.has(vault),
    checkpoint: newest ? { size: newest.size, takenAt: newest.takenAt } : null,
    verifications: trailQueries(vault.db).verifications.all({ limit: 20 }).map(onWire),
  }
}

const onWire = (row: VerificationRow): Verification => ({ ...row, found: row.found.map(fault => ({ ...fault })) })

/** Whether the day's verification is due: none yet, or the newest a day old. */
export function isDue(vault: Vault): boolean {
  const [newest] = trailQueries(vault.db).verifications.all({ limit: 1 })
  return newest === undefined || ageOf(vault, newest.endedAt) >= every
}

/** The newest verification found nothing wrong and is not too old; without one, the vault is younger than that. */
export function isVerified(vault: Vault): boolean {
  const [newest] = trailQueries(vault.db).verifications.all({ limit: 1 })
  const since = newest?.endedAt ?? firstInstant(vault.db)
  return (newest?.outcome ?? 'sound') === 'sound' && (since === null || ageOf(vault, since) <= latest)
}

const ageOf = (vault: Vault, at: string) => Date.parse(vault.now()) - Date.parse(at)

/** A verification that has ended and is to be kept. */
export interface Ended extends Verified, Pick<Verification, 'outcome' | 'begunAt'> {}

/** Keeps a checkpoint and recomputes the whole vault while others are served. Refuses while one runs. */
export async function verifyNow(vault: Vault): Promise<Ended> {
  if (running.has(vault)) throw new Refusal('taken', 'A verification runs already. Its outcome stands here when it has ended.')
  running.add(vault)
  try {
    takeCheckpoint(vault)
    const begunAt = vault.now()
    return { begunAt, ...await outcomeOf(vault) }
  }
  finally {
    running.delete(vault)
  }
}

/** Verifies and keeps what was found; see both. */
export const verifyAndKeep = async (vault: Vault): Promise<Verification> => keepVerification(vault, await verifyNow(vault))

async function outcomeOf({ folder }: Vault): Promise<Omit<Ended, 'begunAt'>> {
  try {
    const verified = await verifyVault(folder, { pause: () => new Promise((resume) => { setImmediate(resume) }) })
    return { ...verified, outcome: verified.faults === 0 ? 'sound' : 'damage' }
  }
  catch (error) {
    // A verification that could not end is kept as such, with its words: it must not pass for a sound one.
    return { outcome: 'failed', entries: 0, rows: 0, faults: 1, found: [{ record: 'vault', fault: error instanceof Error ? error.message : String(error) }] }
  }
}

/** Keeps what a verification found, and raises findings and letters where that is damage. */
export function keepVerification(vault: Vault, { begunAt, outcome, entries, rows, faults, found }: Ended): Verification {
  return vault.write(trailActor, (write) => {
    const row = { begunAt, endedAt: write.now, outcome, entries, rows, faults, found: found.map(fault => ({ ...fault })) }
    const id = trailQueries(vault.db).insertVerification(row)
    write.log({ act: 'vault-verified', id, state: { id, ...row } })
    if (outcome !== 'sound') warn(vault, write, row)
    return { id, ...row }
  })
}

/** A finding for each record that is told, and a letter: nobody has to come and look. */
function warn({ db }: Vault, write: Write, { begunAt, faults, found }: Pick<VerificationRow, 'begunAt' | 'faults' | 'found'>): void {
  for (const { record, fault } of found.slice(0, mostFindings)) raiseDamage(db, write, { record, says: fault })
  tellVault(db, write, 'verification-failed', { at: begunAt, says: `${faults} ${faults === 1 ? 'fault' : 'faults'}; the first: ${found[0]?.record ?? ''} ${found[0]?.fault ?? ''}` })
}

/** More would bury the others; the verification itself names a hundred. */
const mostFindings = 10
