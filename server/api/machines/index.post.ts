import { defineRoute } from '#server/http/route'
import { registerMachine } from '#server/services/places/machines'

export default defineRoute('POST /api/machines', ({ input, actor, vault, once }) => once(() => registerMachine(vault, actor, input.body)))
