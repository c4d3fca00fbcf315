import { defineRoute } from '#server/http/route'
import { listFolders } from '#server/services/line-folder/kept-folders'

export default defineRoute('GET /api/line-folders', ({ actor, vault }) => listFolders(vault, actor))
