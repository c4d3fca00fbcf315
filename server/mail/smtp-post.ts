import { createTransport } from 'nodemailer'
import { PostError, type Post } from './post'
import { composed } from './message'

/** Ten minutes for the answer to the end of a message, as RFC 5321, 4.5.3.2.6 asks: who gives up sooner sends it twice. */
const patience = 10 * 60_000
const knock = 20_000

/** Hands letters to a mail server, one connection a letter. */
export function smtpPost(url: string, from: string, sender: string): Post {
  const transport = createTransport({ url, connectionTimeout: knock, greetingTimeout: knock, socketTimeout: patience, disableFileAccess: true, disableUrlAccess: true })
  return {
    way: 'smtp', from,
    send: async (message) => {
      const raw = await composed(message, from)
      try {
        await transport.sendMail({ envelope: { from: sender, to: message.to.address }, raw })
      }
      catch (error) {
        throw notTaken(error)
      }
    },
    close: () => { transport.close() },
  }
}

/** What the mail server said about this receiver or this text for good (5yz, RFC 5321, 4.2.1); all else may pass. */
function notTaken(error: unknown): PostError {
  const { message = String(error), responseCode = 0, command = '' } = error as { message?: string, responseCode?: number, command?: string }
  const forGood = responseCode >= 500 && responseCode < 600 && (command === 'RCPT TO' || command === 'DATA')
  return new PostError(forGood ? 'refused' : 'unreachable', message.slice(0, 500))
}
