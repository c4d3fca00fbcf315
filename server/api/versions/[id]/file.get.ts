import { handOut } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { versionFile } from '#server/services/versions/version-file'

export default defineRoute('GET /api/versions/:id/file', ({ input, subject, vault }) => handOut(versionFile(vault, subject.id, input.query.form)))
