import { defineRoute } from '#server/http/route'
import { recordLabel } from '#server/services/labels/print-label'

export default defineRoute('POST /api/axes/:id/label', ({ input, subject, actor, vault, once }) => once(() => recordLabel(vault, actor, subject.id, input.body)))
