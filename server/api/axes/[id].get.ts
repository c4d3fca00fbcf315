import { defineRoute } from '#server/http/route'
import { readAxis } from '#server/services/axes/read-axis'

export default defineRoute('GET /api/axes/:id', ({ subject, vault }) => readAxis(vault, subject.id))
