import { defineRoute } from '#server/http/route'
import { beginRun } from '#server/services/judging/runs'

export default defineRoute('POST /api/judging-runs', ({ actor, vault, event, once }) => once(() =>
  beginRun(vault, actor, (error) => { event.context.server.logger.error({ err: error }, 'a judging run broke off') })))
