import { defineRoute } from '#server/http/route'
import { markNone } from '#server/services/known-good/mark'

export default defineRoute('POST /api/axes/:id/known-good/none', ({ input, subject, actor, vault, once }) => once(() => markNone(vault, actor, subject.id, input.body)))
