import { defineRoute } from '#server/http/route'
import { listTokens } from '#server/services/people/tokens'

export default defineRoute('GET /api/tokens', ({ input, vault }) => listTokens(vault, input.query))
