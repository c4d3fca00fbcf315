import { defineRoute } from '#server/http/route'
import { readMachine } from '#server/services/places/machines'

export default defineRoute('GET /api/machines/:id', ({ subject, vault }) => readMachine(vault, subject.id))
