import { defineRoute } from '#server/http/route'
import { listMachines } from '#server/services/places/machines'

export default defineRoute('GET /api/machines', ({ input, actor, vault }) => listMachines(vault, actor, input.query))
