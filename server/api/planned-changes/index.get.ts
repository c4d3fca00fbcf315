import { defineRoute } from '#server/http/route'
import { listPlannedChanges } from '#server/services/planned-changes/planned-changes'

export default defineRoute('GET /api/planned-changes', ({ input, actor, vault }) => listPlannedChanges(vault, actor, input.query))
