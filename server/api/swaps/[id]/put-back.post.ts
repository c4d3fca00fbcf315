import { defineRoute } from '#server/http/route'
import { putOldUnitBack } from '#server/services/swaps/ending'

export default defineRoute('POST /api/swaps/:id/put-back', ({ input, subject, actor, vault, once }) => once(() => putOldUnitBack(vault, actor, subject.id, input.body)))
