import { defineRoute } from '#server/http/route'
import { readVersion } from '#server/services/versions/read-version'

export default defineRoute('GET /api/versions/:id', ({ subject, vault }) => readVersion(vault, subject.id))
