import { defineRoute } from '#server/http/route'
import { changeSite } from '#server/services/places/sites'

export default defineRoute('PATCH /api/sites/:id', ({ input, subject, actor, vault }) => changeSite(vault, actor, subject.id, input.body))
