import { Refusal } from '#shared/errors/refusal'

const usual = 50

/** What a list was asked for: how many, and after which key. */
export interface PageQuery { readonly limit?: number | undefined, readonly cursor?: string | undefined }

/** The key that the cursor stands for; `start` without one. Cursors are whole numbers as text and mean nothing to callers. */
export function afterOf({ cursor }: PageQuery, start = 0): number {
  if (cursor === undefined) return start
  if (!/^\d{1,15}$/.test(cursor)) throw new Refusal('input', '?cursor: not one that this list gave.', { errors: [{ at: '?cursor', code: 'cursor', message: 'not one that this list gave' }] })
  return Number(cursor)
}

export const limitOf = ({ limit }: PageQuery): number => limit ?? usual

/** One row more than the limit was read: it says whether there is a next page and is not shown. */
export function pageOf<Row, Item>(rows: readonly Row[], query: PageQuery, keyOf: (row: Row) => number, itemOf: (row: Row) => Item): { items: Item[], next: string | null } {
  const shown = rows.slice(0, limitOf(query))
  const last = shown.at(-1)
  return { items: shown.map(itemOf), next: rows.length > shown.length && last !== undefined ? String(keyOf(last)) : null }
}
