import { defineRoute } from '#server/http/route'
import { ownLetters } from '#server/services/letters/own'

export default defineRoute('GET /api/me/letters', ({ actor, vault }) => ownLetters(vault, actor))
