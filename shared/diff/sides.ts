import type { Content } from '../settings/types'
import { rulesFor, type Rules } from './rules'
import type { DiffContext } from './types'

/** Two contents with the rules of each; a change goes by those of the second, or of the first where its value is gone. */
export interface Sides {
  readonly before: Content
  readonly after: Content
  readonly was: Rules
  readonly is: Rules
  readonly context: DiffContext
}

/** Rules of both contents; one and the same where they are of one axis kind. */
export function sidesOf(before: Content, after: Content, context: DiffContext): Sides {
  const is = rulesFor(after.axisKind, context)
  return { before, after, context, is, was: before.axisKind === after.axisKind ? is : rulesFor(before.axisKind, context) }
}
