import { defineRoute } from '#server/http/route'
import { listAxes } from '#server/services/axes/read-axis'

export default defineRoute('GET /api/axes', ({ input, actor, vault }) => listAxes(vault, actor, input.query))
