import { defineRoute } from '#server/http/route'
import { listNameplates } from '#server/services/nameplates/nameplates'

export default defineRoute('GET /api/nameplates', ({ input, vault }) => listNameplates(vault, input.query))
