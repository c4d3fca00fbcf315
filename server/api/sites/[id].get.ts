import { defineRoute } from '#server/http/route'
import { readSite } from '#server/services/places/sites'

export default defineRoute('GET /api/sites/:id', ({ subject, vault }) => readSite(vault, subject.id))
