import { defineRoute } from '#server/http/route'
import { listNotRead } from '#server/services/history/not-read'

export default defineRoute('GET /api/history/not-read', ({ input, actor, vault }) => listNotRead(vault, actor, input.query))
