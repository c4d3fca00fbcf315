import { withAttachment } from '#server/http/attachment-body'
import { defineRoute } from '#server/http/route'
import { attach } from '#server/services/attachments/attach'

export default defineRoute('POST /api/versions/:id/attachments', ({ input, subject, actor, vault, event, once }) =>
  withAttachment(event.node.req, vault.folder, input.query, body => once(() => attach(vault, actor, subject.id, body, body.fields), body.digest)))
