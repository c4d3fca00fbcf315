import { defineRoute } from '#server/http/route'
import { closeFinding } from '#server/services/findings/findings'

export default defineRoute('POST /api/findings/:id/close', ({ input, actor, vault, once }) => once(() => closeFinding(vault, actor, input.params.id, input.body)))
