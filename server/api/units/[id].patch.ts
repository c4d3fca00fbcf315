import { defineRoute } from '#server/http/route'
import { changeUnit } from '#server/services/units/units'

export default defineRoute('PATCH /api/units/:id', ({ input, subject, actor, vault }) => changeUnit(vault, actor, subject.id, input.body))
