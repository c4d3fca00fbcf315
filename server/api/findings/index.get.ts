import { defineRoute } from '#server/http/route'
import { listFindings } from '#server/services/findings/findings'

export default defineRoute('GET /api/findings', ({ input, actor, vault }) => listFindings(vault, actor, input.query))
