import { defineRoute } from '#server/http/route'
import { listPeople } from '#server/services/people/people'

export default defineRoute('GET /api/people', ({ input, vault }) => listPeople(vault, input.query))
