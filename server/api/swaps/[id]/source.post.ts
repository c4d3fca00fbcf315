import { defineRoute } from '#server/http/route'
import { chooseSource } from '#server/services/swaps/unit-in'

export default defineRoute('POST /api/swaps/:id/source', ({ input, subject, actor, vault, once }) => once(() => chooseSource(vault, actor, subject.id, input.body)))
