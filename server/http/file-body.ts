import { createHash } from 'node:crypto'
import type { IncomingMessage } from 'node:http'
import busboy from 'busboy'
import { CodedError } from '#shared/errors/coded'

/** Most bytes of one settings file: 2 MiB. */
export const fileLimit = 2 * 1024 * 1024
/** What a form may weigh beside its file. */
const formOverhead = 64 * 1024
/** How much of a body that is too large is read and thrown away, so that the sender gets to see the answer. */
const discardLimit = 128 * 1024 * 1024
/** What a form may hold beside the bytes of its file. */
export const formLimits = { fields: 16, fieldSize: 8 * 1024, fieldNameSize: 64, files: 2, parts: 20, headerPairs: 40 }

export type FileBodyCode = 'too-large' | 'content-type' | 'multipart-broken' | 'body-cut' | 'file-missing' | 'file-twice' | 'field-twice' | 'field-too-large'
export class FileBodyError extends CodedError<FileBodyCode> {}

/** One settings file as it came in, and what stood beside it in the form. */
export interface FileBody {
  readonly bytes: Buffer
  /** File name of the form part; null for a raw body. */
  readonly name: string | null
  readonly mediaType: string
  readonly fields: Readonly<Record<string, string>>
  /** SHA-256 over the file and the fields, without the form's boundary: equal when the same form is sent again. */
  readonly digest: string
}

/** Reads the body as a stream and counts it: neither a missing nor a false Content-Length gets more than 2 MiB into memory. */
export async function readFileBody(request: IncomingMessage): Promise<FileBody> {
  const mediaType = acceptedMediaType(request)
  if (Number(request.headers['content-length'] ?? 0) > discardLimit) throw tooLarge()
  const { bytes, name, fields } = mediaType === 'multipart/form-data'
    ? await readForm(request)
    : { bytes: await readRaw(request, fileLimit), name: null, fields: {} }
  return { bytes, name, mediaType, fields, digest: digestOf(bytes, fields) }
}

function acceptedMediaType(request: IncomingMessage): string {
  const mediaType = (request.headers['content-type'] ?? '').replace(/;.*$/s, '').trim().toLowerCase()
  if (!['application/json', 'text/csv', 'multipart/form-data'].includes(mediaType)) {
    throw new FileBodyError('content-type', `Send the file as application/json, text/csv or multipart/form-data; this came as ${mediaType === '' ? 'nothing named' : mediaType.slice(0, 80)}.`)
  }
  const coding = (request.headers['content-encoding'] ?? 'identity').trim().toLowerCase()
  if (coding !== 'identity') throw new FileBodyError('content-type', `Send the file uncompressed; this came with Content-Encoding ${coding.slice(0, 40)}.`)
  return mediaType
}

const tooLarge = () => new FileBodyError('too-large', 'A settings file may have 2 MiB (2,097,152 bytes); this one has more. Nothing of it was kept.', { limit: fileLimit })
const cut = () => new FileBodyError('body-cut', 'The file ended before all of it had come. Send it again.')

/** Collects up to `limit` bytes; of a longer body the rest is read and dropped before it is refused. */
function readRaw(request: IncomingMessage, limit: number): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    let chunks: Buffer[] = []
    let size = 0
    request.on('data', (chunk: Buffer) => {
      size += chunk.length
      if (size <= limit) chunks.push(chunk)
      else chunks = []
      if (size > discardLimit) {
        request.pause()
        reject(tooLarge())
      }
    })
    request.on('end', () => (size > limit ? reject(tooLarge()) : resolve(Buffer.concat(chunks, size))))
    request.on('close', () => (request.complete ? undefined : reject(cut())))
    request.on('error', () => reject(cut()))
  })
}

interface Form { readonly bytes: Buffer, readonly name: string | null, readonly fields: Record<string, string> }

async function readForm(request: IncomingMessage): Promise<Form> {
  const raw = await readRaw(request, fileLimit + formOverhead)
  return parseForm(raw, request.headers['content-type'] ?? '')
}

function parseForm(raw: Buffer, contentType: string): Promise<Form> {
  return new Promise((resolve, reject) => {
    const broken = (error: unknown) => reject(error instanceof FileBodyError ? error : new FileBodyError('multipart-broken', `The form cannot be taken apart (${error instanceof Error ? error.message.slice(0, 120) : 'unknown'}). Send it again as multipart/form-data with one part named file.`))
    const fields = new Map<string, string>()
    const files: { bytes: Buffer, name: string | null }[] = []
    let parser: busboy.Busboy
    try {
      parser = busboy({ headers: { 'content-type': contentType }, limits: { ...formLimits, fileSize: fileLimit + 1 }, defParamCharset: 'utf8' })
    }
    catch (error) {
      broken(error)
      return
    }
    parser.on('file', (part, stream, info) => {
      const chunks: Buffer[] = []
      stream.on('data', (chunk: Buffer) => chunks.push(chunk))
      stream.on('limit', () => broken(tooLarge()))
      stream.on('error', broken)
      stream.on('end', () => {
        if (part === 'file') files.push({ bytes: Buffer.concat(chunks), name: cleanName(info.filename) })
        else broken(new FileBodyError('multipart-broken', `The part that holds the file is named file; this form has a file named ${part.slice(0, 40)}.`))
      })
    })
    parser.on('field', (name, value, info) => {
      if (info.valueTruncated || info.nameTruncated) broken(new FileBodyError('field-too-large', `The field ${name.slice(0, 40)} is longer than 8 KiB.`))
      else if (name === 'file') broken(new FileBodyError('file-missing', 'The part named file is a text, not a file: give it a file name.'))
      else if (fields.has(name)) broken(new FileBodyError('field-twice', `The field ${name.slice(0, 40)} stands in the form twice.`))
      else fields.set(name, value)
    })
    for (const limit of ['filesLimit', 'fieldsLimit', 'partsLimit'] as const) {
      parser.on(limit, () => broken(new FileBodyError('multipart-broken', 'The form has more parts than an upload may have: one file and up to 16 fields.')))
    }
    parser.on('error', broken)
    parser.on('close', () => {
      const [file, second] = files
      if (!file) broken(new FileBodyError('file-missing', 'The form holds no part named file.'))
      else if (!second) resolve({ ...file, fields: Object.fromEntries(fields) })
      else broken(new FileBodyError('file-twice', 'The form holds two files. Send each file on its own.'))
    })
    parser.end(raw)
  })
}

/** A file name as it is shown and offered for download: no folders, no control or direction characters, at most 255. */
export function cleanName(name: string | null | undefined): string | null {
  const clean = (name ?? '').replace(/^.*[/\\]/s, '').replaceAll(/[\p{Cc}\p{Cf}]/gu, '')
  return clean === '' ? null : [...clean].slice(0, 255).join('')
}

function digestOf(bytes: Buffer, fields: Readonly<Record<string, string>>): string {
  const beside = JSON.stringify(Object.entries(fields).sort(([a], [b]) => (a < b ? -1 : 1)))
  return createHash('sha256').update(beside).update('\n').update(bytes).digest('hex')
}
