import { defineRoute } from '#server/http/route'
import { readCautions } from '#server/services/swaps/make-safe'

export default defineRoute('POST /api/swaps/:id/cautions', ({ input, subject, actor, vault, once }) => once(() => readCautions(vault, actor, subject.id, input.body)))
