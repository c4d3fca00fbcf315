import { vi } from 'vitest'

/** Waits until a check holds. A machine that does many things at once is slow and not wrong: ten seconds. */
export const soon = (check: () => unknown): Promise<unknown> => vi.waitFor(check, { timeout: 10_000, interval: 50 })
