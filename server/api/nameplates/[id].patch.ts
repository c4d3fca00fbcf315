import { defineRoute } from '#server/http/route'
import { reviseNameplate } from '#server/services/nameplates/nameplates'

export default defineRoute('PATCH /api/nameplates/:id', ({ input, actor, vault }) => reviseNameplate(vault, actor, input.params.id, input.body))
