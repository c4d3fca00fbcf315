import { defineRoute } from '#server/http/route'
import { sayRunning } from '#server/services/swaps/motion'

export default defineRoute('POST /api/swaps/:id/running', ({ input, subject, actor, vault, once }) => once(() => sayRunning(vault, actor, subject.id, input.body)))
