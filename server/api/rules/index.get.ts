import { defineRoute } from '#server/http/route'
import { listRules } from '#server/services/rules/rules'

export default defineRoute('GET /api/rules', ({ input, actor, vault }) => listRules(vault, actor, input.query))
