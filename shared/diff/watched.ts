import type { DiffContext } from './types'

export interface Watching { readonly watched: boolean, readonly added: boolean }

/** Says of a field (extra as `extra:KEY`) whether it is watched, everywhere or because the planners of the site added it. */
export function watching(context: DiffContext): (name: string, everywhere: boolean) => Watching {
  const names = new Set(context.watched)
  return (name, everywhere) => {
    const added = names.has(name)
    return { watched: everywhere || added, added }
  }
}
