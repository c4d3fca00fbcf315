import { defineRoute } from '#server/http/route'
import { endRule } from '#server/services/rules/rules'

export default defineRoute('POST /api/rules/:id/end', ({ input, subject, actor, vault, once }) => once(() => endRule(vault, actor, subject.id, input.body)))
