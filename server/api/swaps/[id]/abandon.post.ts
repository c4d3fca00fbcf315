import { defineRoute } from '#server/http/route'
import { abandonSwap } from '#server/services/swaps/ending'

export default defineRoute('POST /api/swaps/:id/abandon', ({ input, subject, actor, vault, once }) => once(() => abandonSwap(vault, actor, subject.id, input.body)))
