import { defineRoute } from '#server/http/route'
import { readSwapKit } from '#server/services/swaps/swap-kit'

export default defineRoute('GET /api/swaps/:id/kit', ({ input, subject, vault }) => readSwapKit(vault, subject.id, input.query.speedPercent))
