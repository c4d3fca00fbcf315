import { defineRoute } from '#server/http/route'
import { readNameplate } from '#server/services/nameplates/nameplates'

export default defineRoute('GET /api/nameplates/:id', ({ input, vault }) => readNameplate(vault, input.params.id))
