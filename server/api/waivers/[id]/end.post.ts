import { defineRoute } from '#server/http/route'
import { endWaiver } from '#server/services/waivers/waivers'

export default defineRoute('POST /api/waivers/:id/end', ({ input, subject, actor, vault, once }) => once(() => endWaiver(vault, actor, subject.id, input.body)))
