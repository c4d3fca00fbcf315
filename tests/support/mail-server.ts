import { simpleParser, type ParsedMail } from 'mailparser'
import { SMTPServer } from 'smtp-server'

/** A mail server that speaks SMTP over a real socket and keeps what it was given. */
export interface MailServer {
  readonly url: string
  /** Letters it said "250" to, as they came over the wire, oldest first. */
  readonly taken: Buffer[]
  readonly read: () => Promise<ParsedMail[]>
  /** What it does with the next letters: an error is its answer, with its reply code; a function decides when it answers at all. */
  answer: Error | (() => Promise<void>) | null
  /** Its answer to a receiver. */
  refuses: (address: string) => Error | null
  readonly close: () => Promise<void>
}

export const reply = (responseCode: number, words: string): Error => Object.assign(new Error(words), { responseCode })

export async function startMailServer({ login }: { login?: { user: string, password: string } } = {}): Promise<MailServer> {
  const server = new SMTPServer({
    authOptional: login === undefined, disabledCommands: ['STARTTLS'], allowInsecureAuth: true, logger: false,
    onAuth: ({ username, password }, _session, done) => {
      if (login !== undefined && username === login.user && password === login.password) done(null, { user: username })
      else done(reply(535, 'wrong user or password'))
    },
    onRcptTo: ({ address }, _session, done) => done(made.refuses(address)),
    onData: (stream, _session, done) => {
      const parts: Buffer[] = []
      stream.on('data', (part: Buffer) => parts.push(part))
      stream.on('end', () => {
        const { answer } = made
        if (answer instanceof Error) return done(answer)
        made.taken.push(Buffer.concat(parts))
        if (answer === null) return done()
        answer().then(() => done(), (error: Error) => done(error))
      })
    },
  })
  // Connections that the other side cut off in the middle are what some tests do.
  server.on('error', () => undefined)
  await new Promise<void>((resolve) => { server.listen(0, '127.0.0.1', resolve) })
  const { port } = server.server.address() as { port: number }
  const user = login === undefined ? '' : `${encodeURIComponent(login.user)}:${encodeURIComponent(login.password)}@`
  const made: MailServer = {
    url: `smtp://${user}127.0.0.1:${port}/?from=marks@larkfield.example`, taken: [], answer: null, refuses: () => null,
    read: () => Promise.all(made.taken.map(bytes => simpleParser(bytes))),
    close: () => new Promise((resolve) => { server.close(() => resolve()) }),
  }
  return made
}
