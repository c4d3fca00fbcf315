import { defineNitroPlugin } from 'nitropack/runtime'
import { openVault, standardScryptCost } from '#server/database/client'
import { StartError } from '#server/database/start-error'
import { clearIncoming } from '#server/http/attachment-body'
import type { ServerContext } from '#server/http/context'
import { openPost } from '#server/mail/open-post'
import { startLetters } from '#server/services/letters/worker'
import { startFolders } from '#server/services/line-folder/nightly'
import { startFits } from '#server/services/readiness/keep-fits'
import { firstStart } from '#server/services/people/first-start'
import { makeLogger } from '#server/services/start/logger'
import { publicOriginOf } from '#server/services/start/public-origin'
import { sessionSecret } from '#server/services/start/secret'
import { keepTrail } from '#server/services/trail/daily'

/** Opens the vault before the first request; where it must not run, the process ends with one plain line. */
export default defineNitroPlugin((nitroApp) => {
  const logger = makeLogger()
  try {
    const server = start(logger)
    nitroApp.hooks.hook('request', (event) => { event.context.server = server })
    const letters = startLetters(server)
    const folders = startFolders(server)
    const fits = startFits(server)
    const endTrail = keepTrail(server.vault, logger)
    nitroApp.hooks.hook('close', async () => {
      endTrail()
      await letters.stop()
      await folders.stop()
      await fits.stop()
      server.vault.close()
    })
  }
  catch (error) {
    if (!(error instanceof StartError)) throw error
    logger.fatal({ code: error.code }, error.message)
    process.exit(1)
  }
})

function start(logger: ServerContext['logger']): ServerContext {
  const { WITNESSMARK_DATA, WITNESSMARK_SCRYPT_COST, NUXT_SESSION_PASSWORD, PUBLIC_URL, SMTP_URL } = process.env
  const scryptCost = Number(WITNESSMARK_SCRYPT_COST ?? standardScryptCost)
  if (scryptCost < standardScryptCost) logger.warn({ scryptCost }, 'WITNESSMARK_SCRYPT_COST makes passwords easier to guess than the standard does; it is meant for tests')
  const vault = openVault(WITNESSMARK_DATA ?? './data', { scryptCost })
  clearIncoming(vault.folder)
  const secret = sessionSecret(vault.folder, NUXT_SESSION_PASSWORD)
  const publicOrigin = publicOriginOf(PUBLIC_URL)
  const post = openPost(vault.folder, SMTP_URL, publicOrigin)
  // Read by the cookie library at the first request.
  process.env.NUXT_SESSION_PASSWORD = secret
  process.env.NUXT_SESSION_COOKIE_SECURE = String(publicOrigin?.startsWith('https:') ?? false)
  firstStart(vault, logger, publicOrigin).catch((error: unknown) => {
    logger.fatal({ err: error }, 'the first start failed')
    process.exit(1)
  })
  logger.info({ folder: vault.folder, schema: vault.schema }, 'vault open')
  return { vault, logger, secret, publicOrigin, post }
}
