import { defineRoute } from '#server/http/route'
import { readReport } from '#server/services/reports/reports'

export default defineRoute('GET /api/reports/:id', ({ input, actor, vault }) => readReport(vault, actor, input.params.id))
