import type { JudgingRun, Rejudged } from '#shared/api/judging'
import type { CheckResult } from '#shared/checks/types'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import { readAllAxes } from '#server/database/axis-state/list'
import { countByLevel, readJudgement, type StoredJudgement } from '#server/database/check/queries'
import type { Vault } from '#server/database/client'
import { readAxisState } from '#server/database/axis-state/queries'
import type { VersionRow } from '#server/database/schema'
import { refreshAxisState } from '../axes/axis-state'
import { versionRow } from '../versions/read-version'
import { standingCounts } from '../waivers/accepted'
import { differsFromKept, judgeToday, keepJudgement, saysOtherwise, type Today } from './judge-again'

/*
 * Judging every current version again takes seconds. It goes in slices, between which others are answered, one run after the
 * other. Runs live in memory: what they judged is stored slice by slice, so that after a restart a new run has the rest to do.
 */

/** Versions a slice: some thirty milliseconds, and one transaction where any of them is judged otherwise. */
const slice = 16
/** Runs whose outcome is still told. */
const told = 20

interface Run extends JudgingRun { done: number, problem: string | null, readonly changed: Rejudged[], readonly actor: PersonActor, readonly versions: readonly { id: number, tag: string }[] }
interface Desk { readonly runs: Run[], last: Promise<void> }

const desks = new WeakMap<Vault, Desk>()

/** Lines up a run over the current versions of the actor's sites. `onFault` hears of what no caller waits for any more. */
export function beginRun(vault: Vault, actor: PersonActor, onFault: (error: unknown) => void): { id: number } {
  const desk = desks.get(vault) ?? { runs: [], last: Promise.resolve() }
  desks.set(vault, desk)
  const versions = readAllAxes(vault.db, actor.sites).flatMap(({ axis, current }) => current ? [{ id: current.id, tag: axis.tag }] : [])
  const run: Run = { id: freshId(desk, vault.now()), done: 0, of: versions.length, changed: [], problem: null, actor, versions }
  desk.runs.push(run)
  desk.runs.splice(0, desk.runs.length - told)
  desk.last = desk.last.then(() => work(vault, run)).catch((error: unknown) => {
    run.problem = 'The run broke off. What it judged is kept; begin again.'
    onFault(error)
  })
  return { id: run.id }
}

/** Never one of an earlier start of the vault: an Idempotency-Key outlives it. */
function freshId({ runs }: Desk, now: string): number {
  return Math.max(Date.parse(now), (runs.at(-1)?.id ?? 0) + 1)
}

/** How far a run of the actor's own has come; of what changed, all but the first `from`. */
export function readRun(vault: Vault, actor: PersonActor, id: number, from = 0): JudgingRun {
  const run = desks.get(vault)?.runs.find(one => one.id === id && one.actor.id === actor.id)
  if (!run) throw new Refusal('not-found', 'This run is not told any more. What it judged is kept; begin another one.')
  return { id, done: run.done, of: run.of, changed: run.changed.slice(from), problem: run.problem }
}

async function work(vault: Vault, run: Run): Promise<void> {
  for (let from = 0; from < run.versions.length; from += slice) {
    await new Promise((resolve) => { setImmediate(resolve) })
    if (!vault.sqlite.open) return
    judgeSlice(vault, run, run.versions.slice(from, from + slice))
  }
}

interface Again { readonly version: VersionRow, readonly tag: string, readonly today: Today, readonly kept: StoredJudgement }

function judgeSlice(vault: Vault, run: Run, versions: Run['versions']): void {
  const again = versions.map(({ id, tag }): Again => {
    const version = versionRow(vault.db, id)
    return { version, tag, today: judgeToday(vault.db, version), kept: readJudgement(vault.db, id) }
  })
  const toKeep = again.filter(({ today, kept }) => differsFromKept(today, kept))
  const changed = toKeep.length === 0
    ? []
    : vault.write(run.actor, write => toKeep.flatMap((one) => {
        keepJudgement(vault.db, write, one.version.id, one.today)
        refreshAxisState(vault.db, one.version.axisId)
        return saysOtherwise(one.today, one.kept) ? [rejudged(vault, one, write.now)] : []
      }))
  run.changed.push(...changed)
  run.done += versions.length
}

function rejudged({ db }: Vault, { version, tag, today, kept }: Again, now: string): Rejudged {
  const { axisId, id, number } = version
  const stopsOf = (results: readonly CheckResult[]) => results.filter(({ level }) => level === 'stop').map(({ message }) => message)
  const known = new Set(stopsOf(kept.results))
  return {
    axisId, tag, versionId: id, number, before: kept.counts, after: countByLevel(today.judgement.results),
    stops: standingCounts(readAxisState(db, axisId) ?? null, now).stop,
    message: stopsOf(today.judgement.results).find(message => !known.has(message)) ?? null,
  }
}
