import { defineRoute } from '#server/http/route'
import { sendAgain } from '#server/services/letters/letters'

export default defineRoute('POST /api/letters/:id/send-again', ({ input, actor, vault, once }) => once(() => sendAgain(vault, actor, input.params.id)))
