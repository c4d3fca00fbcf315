import { uploadFields } from '#shared/api/uploads'
import type { IncomingMessage } from 'node:http'
import type { z } from 'zod'
import { cleanName, readFileBody, type FileBody } from './file-body'
import { checked } from './input'

/** What may stand beside a file; `name` is that of the file. */
type Fields = z.ZodType<{ readonly name?: string | undefined }>

export interface UploadBody<Beside> {
  readonly sent: Pick<FileBody, 'bytes' | 'name'>
  readonly fields: Beside
  readonly digest: string
}

/** The file of an upload and what stands beside it: in the query, or as fields of the form, which go before the query's. */
export async function readUploadBody<Schema extends Fields = typeof uploadFields>(request: IncomingMessage, query: z.output<Schema>, schema: Schema = uploadFields as unknown as Schema): Promise<UploadBody<z.output<Schema>>> {
  const { bytes, name, fields, digest } = await readFileBody(request)
  const given = Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== ''))
  const all = checked(schema, { ...query, ...given }, 'query') as z.output<Schema>
  return { sent: { bytes, name: name ?? cleanName(all.name) }, fields: all, digest }
}
