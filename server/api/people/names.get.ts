import { defineRoute } from '#server/http/route'
import { listNames } from '#server/services/people/people'

export default defineRoute('GET /api/people/names', ({ vault }) => ({ items: listNames(vault) }))
