import { defineRoute } from '#server/http/route'
import { registerNameplate } from '#server/services/nameplates/nameplates'

export default defineRoute('POST /api/nameplates', ({ input, actor, vault, once }) => once(() => registerNameplate(vault, actor, input.body)))
