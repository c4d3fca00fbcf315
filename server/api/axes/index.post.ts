import { defineRoute } from '#server/http/route'
import { registerAxis } from '#server/services/places/axes'

export default defineRoute('POST /api/axes', ({ input, actor, vault, once }) => once(() => registerAxis(vault, actor, input.body)))
