import { accessSync, constants, statfsSync } from 'node:fs'
import type { z } from 'zod'
import type { healthSchema } from '#shared/api/board'
import type { Vault } from '#server/database/client'
import { readQueue } from './letters/letters'
import { isVerified } from './trail/verification'

/** With less free than this the next upload may find the disk full. */
const leastFree = 32 * 1024 * 1024

/** Whether the vault answers, could be written, and was found sound within the last day; nothing is written to find out. */
export function health(vault: Vault): z.infer<typeof healthSchema> {
  const [writable, verified] = [isWritable(vault), isVerified(vault)]
  return { status: writable && verified ? 'ok' : 'failing', schema: vault.schema, writable, verified, lettersWaitingSince: readQueue(vault).waitingSince }
}

function isWritable({ sqlite, folder }: Vault): boolean {
  try {
    accessSync(folder, constants.W_OK)
    const { bavail, bsize } = statfsSync(folder)
    sqlite.exec('BEGIN IMMEDIATE; ROLLBACK')
    return bavail * bsize >= leastFree
  }
  catch {
    // Any failure is the answer itself: not writable.
    return false
  }
}
