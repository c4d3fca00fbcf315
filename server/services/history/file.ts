import type { HistoryQuery } from '#shared/api/history'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { plantOf } from '../people/plant'
import { checkpointNow } from '../trail/trail'
import { historyCsv } from './csv'
import { historyFilter } from './filter'
import { wholeHistory } from './history'
import { historyPdf } from './pdf'
import { questionOf } from './question'
import { placeAndTime, restsOn } from './rests'

/** What stands on every history file besides its lines. */
export interface FileHead {
  readonly plant: string
  readonly question: string
  readonly zone: string
  readonly madeAt: string
  /** How many versions it is told from, which axes nobody read, how far the log was verified. */
  readonly rests: string
  /** The signed checkpoint of the log over all that the file can tell of. */
  readonly checkpoint: string
}

export interface HistoryFile { readonly chunks: Iterable<Buffer> | AsyncIterable<Buffer>, readonly mediaType: string, readonly name: string }

/** Exactly what the list answers to the same query, whole, as a file that is made while it is sent. */
export function historyFile(vault: Vault, actor: Actor, query: HistoryQuery, form: 'csv' | 'pdf'): HistoryFile {
  if (actor.kind === 'person' && !actor.roles.some(role => role === 'planner' || role === 'auditor')) throw new Refusal('role', 'History files are made for planners and auditors.')
  const { words, zone } = questionOf(vault, actor, query)
  const head: FileHead = { plant: plantOf(vault), question: words, zone, madeAt: vault.now(), rests: restsOn(vault, actor, placeAndTime(query), zone).says, checkpoint: checkpointNow(vault).note }
  const filter = historyFilter(vault, actor, query)
  const name = `history-${head.madeAt.slice(0, 16).replace(':', '')}.${form}`
  if (form === 'csv') return { chunks: historyCsv(wholeHistory(vault, filter), head), mediaType: 'text/csv; charset=utf-8', name }
  return { chunks: historyPdf(() => wholeHistory(vault, filter), head), mediaType: 'application/pdf', name }
}
