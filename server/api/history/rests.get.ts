import { defineRoute } from '#server/http/route'
import { questionOf } from '#server/services/history/question'
import { restsOn } from '#server/services/history/rests'

export default defineRoute('GET /api/history/rests', ({ input: { query }, actor, vault }) => restsOn(vault, actor, query, questionOf(vault, actor, query).zone))
