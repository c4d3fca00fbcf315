import { defineRoute } from '#server/http/route'
import { registerLine } from '#server/services/places/lines'

export default defineRoute('POST /api/lines', ({ input, actor, vault, once }) => once(() => registerLine(vault, actor, input.body)))
