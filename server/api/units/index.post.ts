import { defineRoute } from '#server/http/route'
import { registerUnit } from '#server/services/units/units'

export default defineRoute('POST /api/units', ({ input, actor, vault, once }) => once(() => registerUnit(vault, actor, input.body)))
