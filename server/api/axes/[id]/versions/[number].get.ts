import { defineRoute } from '#server/http/route'
import { readVersionByNumber } from '#server/services/versions/read-version'

export default defineRoute('GET /api/axes/:id/versions/:number', ({ input, subject, vault }) => readVersionByNumber(vault, subject.id, input.params.number))
