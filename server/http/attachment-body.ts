import { createHash, randomUUID } from 'node:crypto'
import { mkdirSync, rmSync } from 'node:fs'
import { open } from 'node:fs/promises'
import type { IncomingMessage } from 'node:http'
import { join } from 'node:path'
import { Transform } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import busboy from 'busboy'
import { attachmentFields, attachmentLimit, type AttachmentFields } from '#shared/api/attachments'
import { cleanName, FileBodyError, formLimits } from './file-body'
import { checked } from './input'

/** How much of a body that is too large is read and thrown away, so that the sender gets to see the answer. */
const discardLimit = 4 * attachmentLimit

/** An attachment on its way in: counted and hashed into a file in the vault's folder, never whole in memory. */
export interface AttachmentBody {
  readonly path: string
  readonly size: number
  readonly sha256: string
  readonly name: string | null
  readonly mediaType: string
  readonly fields: AttachmentFields
  /** SHA-256 over the file's hash and the fields: equal when the same is sent again. */
  readonly digest: string
}

interface Spooled { readonly size: number, readonly sha256: string }
interface Came extends Spooled { readonly name: string | null, readonly mediaType: string, readonly fields: Readonly<Record<string, string>> }

/** Where attachments lie until they are stored. */
export const incomingFolder = (folder: string) => join(folder, 'incoming')

/** Takes away what a process left there that ended in the middle of one. */
export const clearIncoming = (folder: string): void => rmSync(incomingFolder(folder), { recursive: true, force: true })

/** Reads one attachment, raw or as the part `file` of a form, and hands it to `use`; what was put aside is gone afterwards, whatever happens. */
export async function withAttachment<Answer>(request: IncomingMessage, folder: string, query: AttachmentFields, use: (body: AttachmentBody) => Answer): Promise<Answer> {
  const coding = (request.headers['content-encoding'] ?? 'identity').trim().toLowerCase()
  if (coding !== 'identity') throw new FileBodyError('content-type', `Send the file uncompressed; this came with Content-Encoding ${coding.slice(0, 40)}.`)
  if (Number(request.headers['content-length'] ?? 0) > discardLimit) throw tooLarge()
  mkdirSync(incomingFolder(folder), { recursive: true, mode: 0o700 })
  const path = join(incomingFolder(folder), randomUUID())
  try {
    const came = mediaTypeOf(request) === 'multipart/form-data' ? await fromForm(request, path) : { ...await spool(request, path), name: null, mediaType: mediaTypeOf(request), fields: {} }
    if (came.size === 0) throw new FileBodyError('file-missing', 'The file is empty: there is nothing to attach.')
    return use(bodyOf(path, came, query))
  }
  finally {
    rmSync(path, { force: true })
  }
}

function bodyOf(path: string, { size, sha256, name, mediaType, fields }: Came, query: AttachmentFields): AttachmentBody {
  const given = Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== ''))
  const all = checked(attachmentFields, { ...query, ...given }, 'query') as AttachmentFields
  const beside = JSON.stringify(Object.entries(all).sort(([a], [b]) => (a < b ? -1 : 1)))
  return { path, size, sha256, name: name ?? cleanName(all.name), mediaType: mediaType || 'application/octet-stream', fields: all, digest: createHash('sha256').update(`${beside}\n${sha256}`).digest('hex') }
}

const mediaTypeOf = (request: IncomingMessage) => (request.headers['content-type'] ?? '').replace(/;.*$/s, '').trim().toLowerCase().slice(0, 100)
const tooLarge = () => new FileBodyError('too-large', 'An attachment may have 20 MiB (20,971,520 bytes); this one has more. Nothing of it was kept.', { limit: attachmentLimit })
const cut = () => new FileBodyError('body-cut', 'The file ended before all of it had come. Send it again.')

/** Writes the stream to a new file. Of one that is too long the rest is read and dropped before it is refused. */
async function spool(source: AsyncIterable<Buffer>, path: string): Promise<Spooled> {
  const hash = createHash('sha256')
  let size = 0
  const file = await open(path, 'wx', 0o600)
  try {
    for await (const chunk of source) {
      size += chunk.length
      if (size > discardLimit) break
      if (size > attachmentLimit) continue
      hash.update(chunk)
      await file.writeFile(chunk)
    }
  }
  catch (error) {
    throw isStreamEnd(error) ? cut() : error
  }
  finally {
    await file.close()
  }
  if (size > attachmentLimit) throw tooLarge()
  return { size, sha256: hash.digest('hex') }
}

/** What Node throws where a sender goes away: the request is aborted, or a stream behind it ends early. */
function isStreamEnd(error: unknown): boolean {
  const { code, message } = error as NodeJS.ErrnoException
  return code === 'ECONNRESET' || code === 'ERR_STREAM_PREMATURE_CLOSE' || code === 'ERR_STREAM_DESTROYED' || message === 'aborted' || message === 'Unexpected end of form'
}

async function fromForm(request: IncomingMessage, path: string): Promise<Came> {
  const fields = new Map<string, string>()
  const files: Promise<Came | Error>[] = []
  const faults: Error[] = []
  const broken = (words: string) => faults.push(new FileBodyError('multipart-broken', words))
  const parser = formParser(request)
  parser.on('file', (part, stream, info) => {
    if (part !== 'file' || files.length > 0) {
      if (part === 'file') faults.push(new FileBodyError('file-twice', 'The form holds two files. Send each file on its own.'))
      else broken(`The part that holds the file is named file; this form has a file named ${part.slice(0, 40)}.`)
      stream.resume()
      return
    }
    // A form that ends early breaks the stream before anybody reads it; spool meets the same error when it does.
    stream.on('error', () => stream.pause())
    // Settled at once, so that a refusal of the form is not lost behind one of the file.
    files.push(spool(stream as AsyncIterable<Buffer>, path).then(spooled => ({ ...spooled, name: cleanName(info.filename), mediaType: info.mimeType.slice(0, 100), fields: {} }), (error: Error) => error))
  })
  parser.on('field', (name, value, info) => {
    if (info.valueTruncated || info.nameTruncated) faults.push(new FileBodyError('field-too-large', `The field ${name.slice(0, 40)} is longer than 8 KiB.`))
    else if (fields.has(name)) faults.push(new FileBodyError('field-twice', `The field ${name.slice(0, 40)} stands in the form twice.`))
    else fields.set(name, value)
  })
  for (const limit of ['filesLimit', 'fieldsLimit', 'partsLimit'] as const) parser.on(limit, () => broken('The form has more parts than an attachment may have: one file and up to 16 fields.'))
  await pipeline(request, counted(), parser).catch((error: unknown) => faults.push(formFault(request, error)))
  const [fault] = faults
  const came = await files[0]
  if (fault) throw fault
  if (came === undefined) throw new FileBodyError('file-missing', 'The form holds no part named file.')
  if (came instanceof Error) throw came
  return { ...came, fields: Object.fromEntries(fields) }
}

function formParser(request: IncomingMessage): busboy.Busboy {
  try {
    return busboy({ headers: { 'content-type': request.headers['content-type'] ?? '' }, limits: { ...formLimits, fileSize: attachmentLimit + 1 }, defParamCharset: 'utf8' })
  }
  catch (error) {
    throw new FileBodyError('multipart-broken', `The form cannot be taken apart (${(error as Error).message.slice(0, 120)}).`)
  }
}

function formFault(request: IncomingMessage, error: unknown): Error {
  if (error instanceof FileBodyError) return error
  if (!request.complete) return cut()
  return new FileBodyError('multipart-broken', `The form cannot be taken apart (${error instanceof Error ? error.message.slice(0, 120) : 'unknown'}). Send it again as multipart/form-data with one part named file.`)
}

/** Passes bytes on up to the limit for what is thrown away. */
function counted(): Transform {
  let size = 0
  return new Transform({
    transform(chunk: Buffer, _encoding, done) {
      size += chunk.length
      done(size > discardLimit ? tooLarge() : null, chunk)
    },
  })
}
