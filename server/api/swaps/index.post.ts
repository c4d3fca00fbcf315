import { defineRoute } from '#server/http/route'
import { openSwap } from '#server/services/swaps/open-swap'

export default defineRoute('POST /api/swaps', ({ input, actor, vault, once }) => once(() => openSwap(vault, actor, input.body)))
