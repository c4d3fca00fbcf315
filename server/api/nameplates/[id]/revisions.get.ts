import { defineRoute } from '#server/http/route'
import { listRevisions } from '#server/services/nameplates/nameplates'

export default defineRoute('GET /api/nameplates/:id/revisions', ({ input, vault }) => ({ items: listRevisions(vault, input.params.id) }))
