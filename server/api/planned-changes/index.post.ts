import { defineRoute } from '#server/http/route'
import { announceChange } from '#server/services/planned-changes/planned-changes'

export default defineRoute('POST /api/planned-changes', ({ input, actor, vault, once }) => once(() => announceChange(vault, actor, input.body)))
