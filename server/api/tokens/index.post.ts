import { defineRoute } from '#server/http/route'
import { makeToken } from '#server/services/people/tokens'

export default defineRoute('POST /api/tokens', ({ input, actor, vault, once }) => once(() => makeToken(vault, actor, input.body)))
