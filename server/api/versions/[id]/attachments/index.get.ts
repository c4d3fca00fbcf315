import { defineRoute } from '#server/http/route'
import { listAttachments } from '#server/services/attachments/read-attachments'

export default defineRoute('GET /api/versions/:id/attachments', ({ subject, vault }) => listAttachments(vault.db, subject.id))
