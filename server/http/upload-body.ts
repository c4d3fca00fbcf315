import { uploadFields, type UploadFields } from '#shared/api/uploads'
import type { IncomingMessage } from 'node:http'
import { cleanName, readFileBody, type FileBody } from './file-body'
import { checked } from './input'

export interface UploadBody {
  readonly sent: Pick<FileBody, 'bytes' | 'name'>
  readonly fields: UploadFields
  readonly digest: string
}

/** The file of an upload and what stands beside it: in the query, or as fields of the form, which go before the query's. */
export async function readUploadBody(request: IncomingMessage, query: UploadFields): Promise<UploadBody> {
  const { bytes, name, fields, digest } = await readFileBody(request)
  const given = Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== ''))
  const all = checked(uploadFields, { ...query, ...given }, 'query') as UploadFields
  return { sent: { bytes, name: name ?? cleanName(all.name) }, fields: all, digest }
}
