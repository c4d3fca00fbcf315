import { defineRoute } from '#server/http/route'
import { chooseLetter } from '#server/services/letters/own'

export default defineRoute('POST /api/me/letters', ({ input, actor, vault, once }) => once(() => chooseLetter(vault, actor, input.body)))
