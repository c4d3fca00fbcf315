import { defineRoute } from '#server/http/route'
import { readLetter } from '#server/services/letters/letters'

export default defineRoute('GET /api/letters/:id', ({ input, vault, event }) => readLetter(vault, event.context.server, input.params.id))
