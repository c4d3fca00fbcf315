import { defineRoute } from '#server/http/route'
import { listVersions } from '#server/services/versions/read-version'

export default defineRoute('GET /api/axes/:id/versions', ({ input, subject, vault }) => listVersions(vault, subject.id, input.query))
