import type { Fault } from '#shared/api/trail'

/** The faults of one verification: all are counted, the first hundred are told. */
export interface Faults { readonly add: (record: string, fault: string) => void, readonly found: readonly Fault[], readonly count: () => number }

const told = 100

export function collectFaults(): Faults {
  const found: Fault[] = []
  let count = 0
  return {
    found,
    count: () => count,
    add: (record, fault) => {
      count += 1
      if (found.length < told) found.push({ record, fault })
    },
  }
}
