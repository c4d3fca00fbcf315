import { defineRoute } from '#server/http/route'
import { makeSafe } from '#server/services/swaps/make-safe'

export default defineRoute('POST /api/swaps/:id/safe', ({ input, subject, actor, vault, once }) => once(() => makeSafe(vault, actor, subject.id, input.body)))
