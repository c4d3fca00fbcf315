import type { Logger } from 'pino'
import type { Vault } from '#server/database/client'
import type { Post } from '#server/mail/post'
import { raiseOff, raiseUnwaived, tellOverdue } from '../findings/sweep'
import { tellUnreleased } from '../swaps/overdue'
import { queueOverdueDigests } from './overdue-digest'
import { sendDue } from './send'

/** How often it looks for letters to send: one question to an index. */
const look = 5000
/** Every how many looks it asks whether something became due by the clock alone. */
const looksARound = 12
/** How long a stop waits for a letter that is under way; what is cut off is taken up again after the lease. */
const lastWait = 5000

/** What becomes due by the passing of time; each does it once, however often it is called. */
const rounds: readonly ((vault: Vault) => number)[] = [raiseOff, raiseUnwaived, tellOverdue, tellUnreleased, queueOverdueDigests]

interface WorkerOptions { readonly vault: Vault, readonly post: Post, readonly publicOrigin: string | null, readonly logger: Pick<Logger, 'error' | 'info'> }

/** Sends letters while the process runs. `stop` lets one that is under way arrive, and leaves no timer behind. */
export function startLetters({ vault, post, publicOrigin, logger }: WorkerOptions): { stop: () => Promise<void> } {
  let timer: NodeJS.Timeout | undefined
  let stopped = false
  let looks = 0
  let running: Promise<void> = Promise.resolve()

  async function turn(): Promise<void> {
    try {
      if (looks % looksARound === 0) for (const round of rounds) round(vault)
      looks += 1
      await sendDue(vault, post, publicOrigin, () => stopped)
    }
    catch (error) {
      logger.error({ err: error }, 'letters: a turn failed; the next one tries again')
    }
    if (!stopped) timer = setTimeout(begin, look).unref()
  }
  function begin(): void { running = turn() }

  begin()
  return {
    stop: async () => {
      stopped = true
      clearTimeout(timer)
      let late: NodeJS.Timeout | undefined
      await Promise.race([running, new Promise((resolve) => { late = setTimeout(resolve, lastWait) })])
      clearTimeout(late)
      post.close()
    },
  }
}
