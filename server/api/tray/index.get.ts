import { defineRoute } from '#server/http/route'
import { listTray } from '#server/services/tray/list'

export default defineRoute('GET /api/tray', ({ input, actor, vault }) => listTray(vault, actor, input.query))
