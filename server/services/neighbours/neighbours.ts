import { neighboursTold, type Neighbours, type SisterGroup } from '#shared/api/neighbours'
import { addressTwice } from '#shared/checks/live/address-twice'
import { sistersHeld, type SisterRow } from '#shared/checks/live/sister-outlier'
import type { LiveResult } from '#shared/checks/live/types'
import { diffRenumbered } from '#shared/diff/renumber'
import { Refusal } from '#shared/errors/refusal'
import type { Content } from '#shared/settings/types'
import type { Actor } from '#server/database/actor'
import { readAllAxes, type AxisListRow } from '#server/database/axis-state/list'
import type { Vault } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import { siteQueries } from '#server/database/site/scope'
import { busGroups, sisterGroups, type OnBus, type Sisters } from './groups'

/** Contents read between two turns of others: some ten milliseconds. */
const slice = 64

type Contents = ReadonlyMap<number, Content>

/** What the axes of a machine are held against in their site: their sisters, and who shares their buses. Reckoned anew each time. */
export async function readNeighbours({ db }: Vault, actor: Actor, machineId: number): Promise<Neighbours> {
  const siteId = siteQueries(db).find('machine', machineId)?.siteId
  if (!siteId) throw new Refusal('not-found', `There is no machine ${machineId}.`)
  const ofSite = readAllAxes(db, actor.sites).filter(({ site }) => site.id === siteId)
  const sisters = sisterGroups(machineId, ofSite)
  const buses = busGroups(machineId, ofSite)
  const contents = await contentsOf(db, [...sisters, ...buses].flatMap(({ axes }) => axes))
  const answer: Neighbours = { sisters: [], buses: buses.map(group => busOnWire(group, contents)) }
  for (const group of sisters) {
    await turn()
    answer.sisters.push(sistersOnWire(db, group, contents, machineId))
  }
  return answer
}

const turn = () => new Promise((resolve) => { setImmediate(resolve) })

/** What the drives hold, each content read once; others are answered in between. */
async function contentsOf(db: VaultDb, axes: readonly AxisListRow[]): Promise<Contents> {
  const ids = [...new Set(axes.flatMap(({ current }) => current ? [current.contentId] : []))]
  const contents = new Map<number, Content>()
  for (const [index, id] of ids.entries()) {
    if (index % slice === slice - 1) await turn()
    contents.set(id, readContent(db, id))
  }
  return contents
}

function sistersOnWire(db: VaultDb, { role, model, axes }: Sisters, contents: Contents, machineId: number): SisterGroup {
  const alike = axes.flatMap((row) => {
    const content = row.current && contents.get(row.current.contentId)
    return content ? [{ row, tag: row.axis.tag, flags: row.axis.flags, content }] : []
  })
  const dictionary = judgingQueries(db).nameplate.get({ model })?.nameplate.dictionary
  const { rows, results } = sistersHeld(alike, dictionary, (model, content) => diffRenumbered(model, content)?.pairs)
  const columns = columnsOf(alike.map(({ row }) => row.machine.id === machineId), rows)
  return {
    role, model, of: alike.length,
    axes: columns.flatMap(index => alike[index] ? [{ id: alike[index].row.axis.id, tag: alike[index].tag, machineId: alike[index].row.machine.id }] : []),
    rows: rows.map(({ key, words, texts, odd }) => ({
      key, words, same: new Set(texts).size === 1, texts: columns.map(index => texts[index] ?? ''),
      odd: columns.flatMap((index, column) => odd.includes(index) ? [column] : []),
    })),
    ...told(results),
  }
}

/** Indices of the axes that get a column: all where they fit, else those of the machine, those that stand apart, then others. */
function columnsOf(own: readonly boolean[], rows: readonly SisterRow[]): number[] {
  const odd = new Set(rows.flatMap(row => row.odd))
  const rank = (index: number) => own[index] ? 0 : odd.has(index) ? 1 : 2
  return [...own.keys()].sort((a, b) => rank(a) - rank(b) || a - b).slice(0, neighboursTold.columns).sort((a, b) => a - b)
}

function busOnWire({ bus, axes }: OnBus, contents: Contents): Neighbours['buses'][number] {
  const onBus = axes.map(({ axis, unit, current }) => {
    const nodeAddress = current ? contents.get(current.contentId)?.setup.nodeAddress : undefined
    return { tag: axis.tag, ...(unit?.serial && { drive: unit.serial }), ...(nodeAddress === undefined ? {} : { nodeAddress }) }
  })
  return { bus, of: axes.length, ...told(addressTwice.judge(onBus)) }
}

function told(results: readonly LiveResult[]): Pick<SisterGroup, 'results' | 'more'> {
  return { results: results.slice(0, neighboursTold.results) as SisterGroup['results'], more: Math.max(0, results.length - neighboursTold.results) }
}
