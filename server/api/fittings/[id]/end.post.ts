import { defineRoute } from '#server/http/route'
import { endFitting } from '#server/services/units/fittings'

export default defineRoute('POST /api/fittings/:id/end', ({ input, subject, actor, vault, once }) => once(() => endFitting(vault, actor, subject.id, input.body)))
