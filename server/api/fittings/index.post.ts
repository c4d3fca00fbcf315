import { defineRoute } from '#server/http/route'
import { openFitting } from '#server/services/units/fittings'

export default defineRoute('POST /api/fittings', ({ input, actor, vault, once }) => once(() => openFitting(vault, actor, input.body)))
