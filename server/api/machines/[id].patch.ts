import { defineRoute } from '#server/http/route'
import { changeMachine } from '#server/services/places/machines'

export default defineRoute('PATCH /api/machines/:id', ({ input, subject, actor, vault }) => changeMachine(vault, actor, subject.id, input.body))
