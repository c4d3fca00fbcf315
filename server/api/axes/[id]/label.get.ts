import { file } from '#server/http/answer'
import { originOf } from '#server/http/origin'
import { defineRoute } from '#server/http/route'
import { drawLabels } from '#server/services/labels/draw-label'
import { readLabels } from '#server/services/labels/read-labels'

export default defineRoute('GET /api/axes/:id/label', async ({ input: { query }, subject, actor, vault, event }) => {
  const answer = readLabels(vault, actor, subject.id, query.machine === 'true', originOf(event))
  if (query.form !== 'pdf') return answer
  const size = query.size ?? '100x50'
  const [first] = answer.labels
  return file(await drawLabels(answer.labels, size, vault.now()), 'application/pdf', { name: `${answer.labels.length > 1 ? answer.machine.name : first?.tag ?? 'axis'}-label-${size}.pdf` })
})
