import { defineRoute } from '#server/http/route'
import { judgingContext } from '#server/services/uploads/judging-context'

export default defineRoute('GET /api/judging-context', ({ input, actor, vault }) => judgingContext(vault, actor, input.query))
