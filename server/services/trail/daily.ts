import type { Logger } from 'pino'
import type { Vault } from '#server/database/client'
import { recordTrailKey } from './key'
import { isDue, verifyAndKeep } from './verification'

const tenMinutes = 600_000

/** Keeps the trail's key in the log and verifies the vault once a day. Answers how to stop looking. */
export function keepTrail(vault: Vault, logger: Pick<Logger, 'info' | 'error'>): () => void {
  recordTrailKey(vault)
  const look = () => {
    if (!isDue(vault)) return
    verifyAndKeep(vault)
      .then(({ outcome, entries, faults }) => { logger[outcome === 'sound' ? 'info' : 'error']({ outcome, entries, faults }, 'vault verified') })
      .catch((error: unknown) => { logger.error({ err: error }, 'the verification could not be kept') })
  }
  const timer = setInterval(look, tenMinutes)
  timer.unref()
  look()
  return () => { clearInterval(timer) }
}
