import { handOut } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { letterFile } from '#server/services/letters/letters'

export default defineRoute('GET /api/letters/:id/file', async ({ input, vault, event }) => handOut(await letterFile(vault, event.context.server, input.params.id)))
