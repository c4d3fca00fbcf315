import { type SetupFieldName, setupFieldNames } from './fields'
import { type MoveFieldName, moveFieldNames } from './move-fields'

/*
 * Keys in the order of the canonical text (by UTF-16 code unit). Readers build their objects in this order and the canonical
 * text is written in it, so that nothing is sorted for each file.
 */

export const sortedSetupNames: readonly SetupFieldName[] = [...setupFieldNames].sort()
export const sortedMoveKeys: readonly (MoveFieldName | 'move')[] = [...moveFieldNames, 'move' as const].sort()
