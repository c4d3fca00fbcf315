import { defineRoute } from '#server/http/route'
import { takeUnitIn } from '#server/services/swaps/unit-in'

export default defineRoute('POST /api/swaps/:id/unit-in', ({ input, subject, actor, vault, once }) => once(() => takeUnitIn(vault, actor, subject.id, input.body)))
