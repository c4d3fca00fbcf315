import { defineRoute } from '#server/http/route'
import { listSpares } from '#server/services/swaps/spares'

export default defineRoute('GET /api/swaps/:id/spares', ({ subject, vault }) => listSpares(vault, subject.id))
