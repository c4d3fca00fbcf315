import { defineRoute } from '#server/http/route'
import { readLine } from '#server/services/places/lines'

export default defineRoute('GET /api/lines/:id', ({ subject, vault }) => readLine(vault, subject.id))
