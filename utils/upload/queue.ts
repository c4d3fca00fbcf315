/**
 * Runs the work over the items, at most `width` at a time, in the order given. Ends early when `stopped` says so; what is
 * on its way then is still waited for. The work must not throw.
 */
export async function runQueue<Item>(items: readonly Item[], width: number, work: (item: Item) => Promise<void>, stopped: () => boolean = () => false): Promise<void> {
  let next = 0
  const lane = async () => {
    while (next < items.length && !stopped()) {
      const item = items[next]
      next += 1
      if (item !== undefined) await work(item)
    }
  }
  await Promise.all(Array.from({ length: Math.min(width, items.length) }, lane))
}
