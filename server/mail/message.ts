import { createTransport } from 'nodemailer'

/** A letter as it leaves. Made of the same letter it is the same, byte for byte, however often it is made. */
export interface Message {
  readonly id: number
  readonly messageId: string
  readonly to: { readonly name: string, readonly address: string }
  readonly subject: string
  readonly text: string
  readonly madeAt: string
}

const composer = createTransport({ streamTransport: true, buffer: true, newline: 'windows', disableFileAccess: true, disableUrlAccess: true })

/** The message as RFC 5322 has it: one part of plain text, marked as written by a machine (RFC 3834, section 5). */
export async function composed({ messageId, to, subject, text, madeAt }: Message, from: string): Promise<Buffer> {
  const { message } = await composer.sendMail({ from, to, subject, text, messageId: `<${messageId}>`, date: new Date(madeAt), headers: { 'Auto-Submitted': 'auto-generated' } })
  if (!Buffer.isBuffer(message)) throw new TypeError('The message was not composed in one piece.')
  return message
}
