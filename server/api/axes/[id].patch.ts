import { defineRoute } from '#server/http/route'
import { changeAxis } from '#server/services/places/axes'

export default defineRoute('PATCH /api/axes/:id', ({ input, subject, actor, vault }) => changeAxis(vault, actor, subject.id, input.body))
