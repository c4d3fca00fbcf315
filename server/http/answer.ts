/** What a handler answers where the table lists more than one status: `answer(201, body)`. */
export class Answer {
  constructor(readonly status: number, readonly body: unknown) {}
}
export const answer = (status: number, body: unknown): Answer => new Answer(status, body)

/** A body that is no JSON: a download, a text. Built by `file`. */
export class FileAnswer {
  constructor(
    readonly body: Buffer,
    readonly mediaType: string,
    /** Offered for download under this name; null = shown in place. */
    readonly name: string | null = null,
    /** Strong validator of an immutable body; null = never kept by the browser. */
    readonly etag: string | null = null,
  ) {}
}

export function file(body: Buffer | string, mediaType: string, { name = null, etag = null }: { name?: string | null, etag?: string | null } = {}): FileAnswer {
  return new FileAnswer(typeof body === 'string' ? Buffer.from(body, 'utf8') : body, mediaType, name, etag)
}

/** A kept file as its service hands it out: for download, and known by its bytes. */
export const handOut = ({ bytes, mediaType, name, etag }: { bytes: Buffer, mediaType: string, name: string, etag: string }): FileAnswer =>
  new FileAnswer(bytes, mediaType, name, etag)

/** A file that is sent chunk by chunk. What fails before the first chunk is answered as a problem, later the connection is cut: half a file never looks whole. */
export class StreamAnswer {
  constructor(
    readonly chunks: Iterable<Buffer> | AsyncIterable<Buffer>,
    /** null = nobody knows beforehand; a stream that breaks then ends without its last chunk (RFC 9112, 7.1). */
    readonly size: number | null,
    readonly mediaType: string,
    readonly name: string,
    readonly etag: string | null = null,
  ) {}
}
