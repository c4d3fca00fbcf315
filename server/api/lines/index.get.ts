import { defineRoute } from '#server/http/route'
import { listLines } from '#server/services/places/lines'

export default defineRoute('GET /api/lines', ({ input, actor, vault }) => listLines(vault, actor, input.query))
