import { defineRoute } from '#server/http/route'
import { releaseSwap } from '#server/services/swaps/release'

export default defineRoute('POST /api/swaps/:id/release', ({ input, subject, actor, vault, once }) => once(() => releaseSwap(vault, actor, subject.id, input.body)))
