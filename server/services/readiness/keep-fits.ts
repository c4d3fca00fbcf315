import type { Logger } from 'pino'
import { setTimeout } from 'node:timers/promises'
import type { VaultActor } from '#server/database/actor'
import { readAllAxes } from '#server/database/axis-state/list'
import type { Vault } from '#server/database/client'
import { logQueries } from '#server/database/log/queries'
import { putSpareFit } from '#server/database/spare-fit/queries'
import { readStock, takeUnkept } from './stock'

/*
 * Which spares fit is worked out beside all else, a fit at a time, and kept: an answer about 10,000 axes only looks it up. A
 * reading of values changes what one axis asks for; a nameplate, a rule or a waiver what those ask for that it is about.
 */

const keeper: VaultActor = { kind: 'vault', name: 'readiness', sites: null, peer: '' }
/** How often it looks whether anything changed, in ms. */
const look = 5000
/** Between two axes, so that requests are not kept waiting for longer than one takes. */
const pause = 5
const together = 100

/** Works out every fit that is not settled, and keeps it. Answers how many axes it took. */
export async function settleFits(vault: Vault, stopped: () => boolean = () => false): Promise<number> {
  let taken = 0
  for (const row of readAllAxes(vault.db, null)) {
    if (stopped()) break
    if (readStock(vault.db, vault.now(), 0).spareFor(row).settled) continue
    readStock(vault.db, vault.now(), Infinity).spareFor(row)
    taken += 1
    if (taken % together === 0) keepFits(vault)
    await setTimeout(pause)
  }
  keepFits(vault)
  return taken
}

function keepFits(vault: Vault): void {
  const rows = takeUnkept(vault.db)
  if (rows.length > 0) vault.write(keeper, () => rows.forEach(row => putSpareFit(vault.db, row)))
}

/** Keeps the fits as they are by now, while the process runs. `stop` lets the axis that it is at come to its end. */
export function startFits({ vault, logger }: { readonly vault: Vault, readonly logger: Pick<Logger, 'error'> }): { readonly stop: () => Promise<void> } {
  let stopped = false
  let running: Promise<unknown> = Promise.resolve()
  let seen: number | null = null
  const turn = () => {
    const newest = logQueries(vault.db).newest.get()?.seq ?? -1
    if (newest === seen) return
    running = running.then(() => settleFits(vault, () => stopped)).then(() => { seen = newest }).catch((error: unknown) => {
      logger.error({ err: error }, 'which spares fit could not be worked out; the next look tries again')
    })
  }
  const timer = setInterval(turn, look).unref()
  turn()
  return {
    stop: async () => {
      stopped = true
      clearInterval(timer)
      await running
    },
  }
}
