import { answer } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { assignFromTray } from '#server/services/tray/assign'

export default defineRoute('POST /api/tray/:id/assign', ({ input, subject, actor, vault, once }) => once(() => {
  const assigned = assignFromTray(vault, actor, subject.id, input.body)
  return answer('sighting' in assigned ? 200 : 201, assigned)
}))
