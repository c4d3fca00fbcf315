import { defineRoute } from '#server/http/route'
import { tickDone } from '#server/services/swaps/tick'

export default defineRoute('POST /api/swaps/:id/ticks', ({ input, subject, actor, vault, once }) => once(() => tickDone(vault, actor, subject.id, input.body)))
