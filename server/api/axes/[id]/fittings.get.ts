import { defineRoute } from '#server/http/route'
import { listFittings } from '#server/services/axes/read-axis'

export default defineRoute('GET /api/axes/:id/fittings', ({ subject, vault }) => listFittings(vault, subject.id))
