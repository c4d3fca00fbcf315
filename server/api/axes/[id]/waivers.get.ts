import { defineRoute } from '#server/http/route'
import { listWaivers } from '#server/services/waivers/waivers'

export default defineRoute('GET /api/axes/:id/waivers', ({ input, subject, vault }) => listWaivers(vault, subject.id, input.query))
