import { handOut } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { trayFile } from '#server/services/tray/list'

export default defineRoute('GET /api/tray/:id/file', ({ subject, vault }) => handOut(trayFile(vault, subject.id)))
