/*
 * What this browser keeps for pages without reception, in one database of its own: entries that wait to be sent, in the order
 * in which they were entered, and copies of what was read last, by name.
 */
const name = 'witnessmark'
const rooms = { outbox: { keyPath: 'order', autoIncrement: true }, copies: { keyPath: 'name' } } as const
export type Room = keyof typeof rooms

let opened: Promise<IDBDatabase> | undefined

function database(): Promise<IDBDatabase> {
  opened ??= new Promise<IDBDatabase>((resolve, reject) => {
    const asked = indexedDB.open(name, 1)
    asked.onupgradeneeded = () => {
      for (const [room, options] of Object.entries(rooms)) asked.result.createObjectStore(room, options)
    }
    asked.onsuccess = () => {
      // A window of a newer release that changes the rooms is not held up by this one.
      asked.result.onversionchange = () => asked.result.close()
      asked.result.onclose = () => { opened = undefined }
      resolve(asked.result)
    }
    asked.onerror = () => reject(asked.error ?? new DOMException('The browser opens no database.', 'UnknownError'))
  }).catch((failure: unknown) => {
    // Asked again next time: a browser that was short of room may have some then.
    opened = undefined
    throw failure instanceof DOMException ? failure : new DOMException('The browser keeps nothing.', 'NotSupportedError')
  })
  return opened
}

/**
 * One transaction; what it answers is on the disk, not in a buffer of the system: a flat battery takes nothing along.
 * Throws a DOMException where the browser keeps nothing or has no room left; then nothing of it was kept.
 */
async function transact<Answer>(room: Room, mode: IDBTransactionMode, work: (rows: IDBObjectStore) => { answer: Answer }): Promise<Answer> {
  const db = await database()
  return new Promise((resolve, reject) => {
    const transaction = db.transaction(room, mode, { durability: 'strict' })
    const outcome = work(transaction.objectStore(room))
    transaction.oncomplete = () => resolve(outcome.answer)
    transaction.onabort = () => reject(transaction.error ?? new DOMException('The browser gave it up.', 'AbortError'))
  })
}

/** Every row, in the order of its key. */
export function rowsOf(room: Room): Promise<unknown[]> {
  return transact(room, 'readonly', (rows) => {
    const outcome: { answer: unknown[] } = { answer: [] }
    rows.getAll().onsuccess = ({ target }) => { outcome.answer = (target as IDBRequest<unknown[]>).result }
    return outcome
  })
}

/** The row under a key; undefined where there is none. */
export function rowOf(room: Room, key: IDBValidKey): Promise<unknown> {
  return transact(room, 'readonly', (rows) => {
    const outcome: { answer: unknown } = { answer: undefined }
    rows.get(key).onsuccess = ({ target }) => { outcome.answer = (target as IDBRequest<unknown>).result }
    return outcome
  })
}

export function putRow(room: Room, row: unknown): Promise<void> {
  return transact(room, 'readwrite', (rows) => {
    rows.put(row)
    return { answer: undefined }
  })
}

/** Puts and takes away in one step, by what stands there now; another window may have written since. Answers all rows after it. */
export function changeRows(room: Room, change: (now: readonly unknown[]) => { readonly put: readonly unknown[], readonly drop: readonly IDBValidKey[] }): Promise<unknown[]> {
  return transact(room, 'readwrite', (rows) => {
    const outcome: { answer: unknown[] } = { answer: [] }
    rows.getAll().onsuccess = ({ target }) => {
      const { put, drop } = change((target as IDBRequest<unknown[]>).result)
      for (const key of drop) rows.delete(key)
      for (const row of put) rows.put(row)
      rows.getAll().onsuccess = ({ target: after }) => { outcome.answer = (after as IDBRequest<unknown[]>).result }
    }
    return outcome
  })
}
