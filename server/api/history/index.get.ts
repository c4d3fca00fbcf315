import { defineRoute } from '#server/http/route'
import { listHistory } from '#server/services/history/history'

export default defineRoute('GET /api/history', ({ input, actor, vault }) => listHistory(vault, actor, input.query))
