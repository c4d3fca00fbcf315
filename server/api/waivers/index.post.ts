import { defineRoute } from '#server/http/route'
import { giveWaiver } from '#server/services/waivers/waivers'

export default defineRoute('POST /api/waivers', ({ input, actor, vault, once }) => once(() => giveWaiver(vault, actor, input.body)))
