import { parseLeaf } from '#shared/trail/entry'

/** An entry as the trail page shows it. */
export interface ShownEntry { readonly seq: number, readonly at: string, readonly who: string, readonly act: string, readonly subject: string, readonly note: string }

/** Reads a leaf; one that cannot be read says so in its row and hides nothing. */
export function readEntry({ seq, leaf }: { readonly seq: number, readonly leaf: string }): ShownEntry {
  try {
    const { at, actor, act, subject, note } = parseLeaf(leaf)
    return { seq, at, who: actor.kind === 'token' ? `${actor.name}, a token` : actor.kind === 'vault' ? `the vault, ${actor.name}` : actor.name, act: act.replaceAll('-', ' '), subject: `${subject.kind} ${subject.id}`, note: note ?? '' }
  }
  catch (error) {
    return { seq, at: new Date(0).toISOString(), who: '', act: 'cannot be read', subject: '', note: error instanceof Error ? error.message : String(error) }
  }
}
