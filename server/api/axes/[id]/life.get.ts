import { defineRoute } from '#server/http/route'
import { axisLife } from '#server/services/axes/life'

export default defineRoute('GET /api/axes/:id/life', ({ input, subject, vault }) => axisLife(vault, subject.id, input.query))
