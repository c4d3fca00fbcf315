import type { Logger } from 'pino'
import type { Vault } from '#server/database/client'
import { lineFolderRows } from '#server/database/line/queries'
import { keepFolder, readKept } from './kept-folders'

/** From this hour on, by the clock of the site, a night's folders are made. */
const nightHour = 2
const dayAndHour = (instant: string, timeZone: string): string => new Intl.DateTimeFormat('sv-SE', { timeZone, year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', hourCycle: 'h23' }).format(new Date(instant))

/**
 * Whether the folder of a line is due: none was made, or tried, on this day of the site's calendar since the hour of the night. A
 * vault that was off at night makes it when it is back.
 */
export function isDue(last: string | null, now: string, timeZone: string): boolean {
  const night = (instant: string) => {
    const [date = '', hour = '0'] = dayAndHour(instant, timeZone).split(' ')
    return Number(hour) >= nightHour ? date : ''
  }
  const today = night(now)
  return last === null || (today !== '' && night(last) !== today)
}

/** Makes the folders that are due, one after the other. Answers how many it made. */
export async function makeDueFolders(vault: Vault, origin: string, logger: Pick<Logger, 'info' | 'error'>, stopped: () => boolean = () => false): Promise<number> {
  let made = 0
  for (const { id, name, timeZone, axes } of lineFolderRows(vault.db).all.all({ sites: null })) {
    const { kept, failed } = readKept(vault, id)
    const last = [kept?.madeAt, failed?.at].filter(at => at !== undefined).sort().at(-1) ?? null
    if (stopped()) break
    if (axes === 0 || !isDue(last, vault.now(), timeZone)) continue
    const told = await keepFolder(vault, id, origin)
    if (told.failed) logger.error({ line: name, problem: told.failed.problem }, 'the line folder could not be made; the one before stays')
    else logger.info({ line: name, bytes: told.kept?.bytes }, 'line folder made')
    made += 1
  }
  return made
}

const every = 10 * 60_000

/** Looks every ten minutes for what is due. `stop` lets a folder that is being made come to its end. */
export function startFolders({ vault, logger, publicOrigin }: { readonly vault: Vault, readonly logger: Logger, readonly publicOrigin: string | null }): { readonly stop: () => Promise<void> } {
  let running: Promise<unknown> = Promise.resolve()
  let stopped = false
  const look = () => {
    running = running.then(() => makeDueFolders(vault, publicOrigin ?? '', logger, () => stopped)).catch((error: unknown) => logger.error({ err: error }, 'the line folders could not be looked after'))
  }
  const timer = setInterval(look, every).unref()
  return {
    stop: async () => {
      stopped = true
      clearInterval(timer)
      await running
    },
  }
}
