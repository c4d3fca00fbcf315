import { defineRoute } from '#server/http/route'
import { watchPlace } from '#server/services/letters/own'

export default defineRoute('POST /api/me/watches', ({ input, actor, vault, once }) => once(() => watchPlace(vault, actor, input.body)))
