import { defineRoute } from '#server/http/route'
import { readFinding } from '#server/services/findings/findings'

export default defineRoute('GET /api/findings/:id', ({ input, vault }) => readFinding(vault, input.params.id))
