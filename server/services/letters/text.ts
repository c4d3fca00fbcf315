import type { AddressedLetter } from '#server/database/letter/queries'
import type { Message } from '#server/mail/message'

/** Lines of a letter stay within what every reader shows (RFC 5322, 2.1.1: should be no more than 78). */
const widest = 76

/** A letter as it goes out: plain text, addresses by PUBLIC_URL, the path alone where that is not set. */
export function letterText({ letter: { paragraphs, path } }: AddressedLetter, publicOrigin: string | null): string {
  const address = (to: string) => (publicOrigin === null ? `${to} of your Witnessmark` : `${publicOrigin}${to}`)
  return [
    ...paragraphs.map(wrapped),
    `Look at it:\n${address(path)}`,
    `-- \nWhich letters you get, you choose yourself:\n${address('/me')}`,
  ].join('\n\n') + '\n'
}

export function messageOf(addressed: AddressedLetter, publicOrigin: string | null): Message {
  const { letter: { id, messageId, title, madeAt }, name, email } = addressed
  return { id, messageId, madeAt, to: { name: plain(name), address: email }, subject: plain(title), text: letterText(addressed, publicOrigin) }
}

/** One line: what people typed must not begin another one of a letter's head. */
// eslint-disable-next-line no-control-regex -- control characters are what it is about
const plain = (text: string) => text.replaceAll(/[\u0000-\u001f\u007f\u2028\u2029]+/g, ' ')

/** Breaks between words; a paragraph of several lines was laid out by who wrote it. */
function wrapped(paragraph: string): string {
  if (paragraph.includes('\n')) return paragraph
  const lines: string[] = []
  for (const word of paragraph.split(' ')) {
    const last = lines.at(-1)
    if (last !== undefined && last.length + 1 + word.length <= widest) lines[lines.length - 1] = `${last} ${word}`
    else lines.push(word)
  }
  return lines.join('\n')
}
