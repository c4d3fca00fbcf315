import { defineRoute } from '#server/http/route'
import { readPlannedChange } from '#server/services/planned-changes/planned-changes'

export default defineRoute('GET /api/planned-changes/:id', ({ input, actor, vault }) => readPlannedChange(vault, actor, input.params.id))
