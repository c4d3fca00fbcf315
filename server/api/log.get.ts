import { defineRoute } from '#server/http/route'
import { listLog } from '#server/services/log/log'

export default defineRoute('GET /api/log', ({ input, actor, vault }) => listLog(vault, actor, input.query))
