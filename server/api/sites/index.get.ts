import { defineRoute } from '#server/http/route'
import { listSitesPage } from '#server/services/places/sites'

export default defineRoute('GET /api/sites', ({ input, actor, vault }) => listSitesPage(vault, actor, input.query))
