import { defineRoute } from '#server/http/route'
import { endPlannedChange } from '#server/services/planned-changes/planned-changes'

export default defineRoute('POST /api/planned-changes/:id/end', ({ input, actor, vault, once }) => once(() => endPlannedChange(vault, actor, input.params.id, input.body)))
