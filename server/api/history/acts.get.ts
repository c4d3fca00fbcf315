import { defineRoute } from '#server/http/route'
import { listActs } from '#server/services/history/acts'

export default defineRoute('GET /api/history/acts', ({ input, actor, vault }) => listActs(vault, actor, input.query))
