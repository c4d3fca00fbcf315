import { defineRoute } from '#server/http/route'
import { axisValues } from '#server/services/axes/values'

export default defineRoute('GET /api/axes/:id/values', ({ input, subject, vault }) => axisValues(vault, subject.id, input.query))
