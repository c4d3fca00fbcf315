import { defineRoute } from '#server/http/route'
import { makeRule } from '#server/services/rules/rules'

export default defineRoute('POST /api/rules', ({ input, actor, vault, once }) => once(() => makeRule(vault, actor, input.body)))
