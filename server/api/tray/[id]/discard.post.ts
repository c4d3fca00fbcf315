import { defineRoute } from '#server/http/route'
import { discardFromTray } from '#server/services/tray/discard'

export default defineRoute('POST /api/tray/:id/discard', ({ input, subject, actor, vault, once }) => once(() => {
  discardFromTray(vault, actor, subject.id, input.body.reason)
  return {}
}))
