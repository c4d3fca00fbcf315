import { defineRoute } from '#server/http/route'
import { recordMotion } from '#server/services/swaps/motion'

export default defineRoute('POST /api/swaps/:id/first-motion', ({ input, subject, actor, vault, once }) => once(() => recordMotion(vault, actor, subject.id, input.body)))
