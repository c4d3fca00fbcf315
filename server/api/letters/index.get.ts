import { defineRoute } from '#server/http/route'
import { listLetters } from '#server/services/letters/letters'

export default defineRoute('GET /api/letters', ({ input, vault, event }) => listLetters(vault, event.context.server, input.query))
