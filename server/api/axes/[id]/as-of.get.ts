import { defineRoute } from '#server/http/route'
import { axisAsOf } from '#server/services/axes/read-axis'

export default defineRoute('GET /api/axes/:id/as-of', ({ input, subject, vault }) => axisAsOf(vault, subject.id, input.query.at))
