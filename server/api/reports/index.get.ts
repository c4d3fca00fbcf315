import { defineRoute } from '#server/http/route'
import { listReports } from '#server/services/reports/reports'

export default defineRoute('GET /api/reports', ({ input, actor, vault }) => listReports(vault, actor, input.query))
