import { defineRoute } from '#server/http/route'
import { keepNote } from '#server/services/swaps/tick'

export default defineRoute('POST /api/swaps/:id/note', ({ input, subject, actor, vault, once }) => once(() => keepNote(vault, actor, subject.id, input.body)))
