import { Refusal } from '#shared/errors/refusal'

/** Refuses an edit that does not say what it read (428) or that read an older state (409, with the current one). */
export function assertRev(read: number | undefined, now: number, current: () => unknown): void {
  if (read === undefined) throw new Refusal('rev-missing', 'Send the rev that you read, so that no one else’s edit is lost.')
  if (read !== now) throw new Refusal('edited-meanwhile', 'Someone edited this meanwhile. Look at the present state, then edit again.', { current: current() })
}

/** The fields of a merge patch that are named in it, `rev` aside: RFC 7396 leaves alone what it does not name. */
export function named<Patch extends { rev?: number | undefined }>({ rev: _rev, ...patch }: Patch): { [Key in Exclude<keyof Patch, 'rev'>]?: Exclude<Patch[Key], undefined> } {
  return Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined)) as { [Key in Exclude<keyof Patch, 'rev'>]?: Exclude<Patch[Key], undefined> }
}
