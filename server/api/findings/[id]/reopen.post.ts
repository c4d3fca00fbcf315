import { defineRoute } from '#server/http/route'
import { reopenFinding } from '#server/services/findings/findings'

export default defineRoute('POST /api/findings/:id/reopen', ({ input, actor, vault, once }) => once(() => reopenFinding(vault, actor, input.params.id, input.body)))
