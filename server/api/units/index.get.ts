import { defineRoute } from '#server/http/route'
import { listUnits } from '#server/services/units/units'

export default defineRoute('GET /api/units', ({ input, actor, vault }) => listUnits(vault, actor, input.query))
