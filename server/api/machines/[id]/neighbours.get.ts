import { defineRoute } from '#server/http/route'
import { readNeighbours } from '#server/services/neighbours/neighbours'

export default defineRoute('GET /api/machines/:id/neighbours', ({ input, actor, vault }) => readNeighbours(vault, actor, input.params.id))
