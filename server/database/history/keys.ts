/** The key of a change. */
export interface ChangeKey { readonly versionId: number, readonly seq: number }
/** A key that was walked over; a hit is what is asked for. */
export interface Walked extends ChangeKey { readonly hit: boolean }

export const newestFirst = (a: ChangeKey, b: ChangeKey): number => b.versionId - a.versionId || b.seq - a.seq
