import { defineRoute } from '#server/http/route'
import { explainFinding } from '#server/services/findings/findings'

export default defineRoute('POST /api/findings/:id/explain', ({ input, actor, vault, once }) => once(() => explainFinding(vault, actor, input.params.id, input.body)))
