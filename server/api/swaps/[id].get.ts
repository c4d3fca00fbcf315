import { defineRoute } from '#server/http/route'
import { swapOf } from '#server/services/swaps/list-swaps'

export default defineRoute('GET /api/swaps/:id', ({ subject, vault }) => swapOf(vault, subject.id))
