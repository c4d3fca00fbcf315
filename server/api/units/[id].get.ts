import { defineRoute } from '#server/http/route'
import { readUnit } from '#server/services/units/units'

export default defineRoute('GET /api/units/:id', ({ subject, vault }) => readUnit(vault, subject.id))
