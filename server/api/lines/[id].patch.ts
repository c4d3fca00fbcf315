import { defineRoute } from '#server/http/route'
import { changeLine } from '#server/services/places/lines'

export default defineRoute('PATCH /api/lines/:id', ({ input, subject, actor, vault }) => changeLine(vault, actor, subject.id, input.body))
