import { defineRoute } from '#server/http/route'
import { listSwaps } from '#server/services/swaps/list-swaps'

export default defineRoute('GET /api/swaps', ({ input, actor, vault }) => listSwaps(vault, actor, input.query))
