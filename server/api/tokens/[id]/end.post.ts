import { defineRoute } from '#server/http/route'
import { stopToken } from '#server/services/people/tokens'

export default defineRoute('POST /api/tokens/:id/end', ({ input, actor, vault, once }) => once(() => stopToken(vault, actor, input.params.id)))
