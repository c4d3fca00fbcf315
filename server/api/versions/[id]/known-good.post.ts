import { defineRoute } from '#server/http/route'
import { markKnownGood } from '#server/services/known-good/mark'

export default defineRoute('POST /api/versions/:id/known-good', ({ input, subject, actor, vault, once }) => once(() => markKnownGood(vault, actor, subject.id, input.body)))
