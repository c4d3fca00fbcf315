import { file } from '#server/http/answer'
import { defineRoute } from '#server/http/route'
import { versionChanges, versionPatch, versionText } from '#server/services/versions/version-changes'

export default defineRoute('GET /api/versions/:id/changes', ({ input: { query: { against, form } }, subject, actor, vault }) => {
  if (form === 'json-patch') return file(JSON.stringify(versionPatch(vault, actor, against, subject.id)), 'application/json-patch+json')
  if (form === 'text') return file(versionText(vault, actor, against, subject.id), 'text/plain; charset=utf-8')
  return versionChanges(vault, actor, against, subject.id)
})
