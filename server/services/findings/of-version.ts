import { byWeight } from '#shared/diff/order'
import { seesSite, type Actor } from '#server/database/actor'
import { readAxisState } from '#server/database/axis-state/queries'
import type { Write } from '#server/database/client'
import { findingQueries } from '#server/database/finding/queries'
import type { AxisPlace } from '#server/database/judging/queries'
import { personQueries } from '#server/database/person/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { sightingQueries } from '#server/database/sighting/queries'
import { versionQueries } from '#server/database/version/queries'
import { tellWatchers } from '../letters/queue'
import { axisNamed } from '../uploads/axis-named'
import type { PlannedVersion } from '../uploads/plan-upload'
import type { Sender } from '../uploads/store-parts'
import type { VersionFields } from '../uploads/version-fields'
import { personName } from '../versions/summary'
import { plannedExplanations } from './planned'
import { addShowing, raiseFinding, type Explaining, type Raised } from './raise'
import { raiseStops, standingStops } from './stops'
import { offKey } from './sweep'
import { changeLine, changeTitle } from './words'

/** What a stored version asks a person to explain; late ones ask nothing. Within the write that stores it, after the axis' state is derived. */
export function findingsOfVersion(db: VaultDb, write: Write, sender: Sender, fields: VersionFields, plan: PlannedVersion, version: VersionRow): Raised[] {
  if (plan.late) return []
  const { placed: { place }, ingested, judgement } = plan
  addToOff(db, write, version)
  const stops = standingStops(db, place.axis.id, judgement, () => ingested.content, write.now)
  return [
    ...watchedChange(db, write, sender, fields, plan, version),
    ...raiseStops(db, write, place, version, stops),
    ...otherAxis(db, write, place, fields, version),
  ]
}

function watchedChange(db: VaultDb, write: Write, sender: Sender, fields: VersionFields, { placed: { place }, told, base }: PlannedVersion, version: VersionRow): Raised[] {
  const changes = byWeight(told.filter(({ watched }) => watched))
  const [first] = changes
  if (base === null || first === undefined) return []
  const { axis, site } = place
  const since = lastSeen(db, base, version)
  const explained = [...plannedExplanations(db, axis.id, changes, since, version.orderAt), ...ownWords(db, sender, fields)]
  const title = changeTitle(axis.tag, changes, { before: { number: base.number, at: since }, after: { number: version.number, at: version.orderAt }, zone: site.timeZone })
  return [raiseFinding(db, write, {
    cause: 'watched-change', causeKey: `axis:${axis.id}:version:${version.id}`, siteId: site.id, weight: first.weight, title, explained,
    showings: [{ axisId: axis.id, versionId: version.id, baseId: base.id, says: title, changes }],
    told: ({ id, state }) => tellWatchers(db, write, 'watched-change', axis.id, {
      versionId: version.id, number: version.number, capturedAt: version.capturedAt, changes: changes.map(changeLine),
      storedBy: personName(db, sender.personId) ?? `person ${sender.personId}`, finding: { id, explained: state === 'explained' },
    }),
  })]
}

/** When the version before was last seen to stand: the change was made after that. */
function lastSeen(db: VaultDb, base: VersionRow, version: VersionRow): string {
  const seen = sightingQueries(db).lastOfVersion.get({ versionId: base.id })?.capturedAt
  return seen !== undefined && seen > base.orderAt && seen <= version.orderAt ? seen : base.orderAt
}

/** A reason or a work order that a named person gave for this axis alone; a script, a shared account and one reason for many files explain nothing. */
function ownWords(db: VaultDb, { personId, tokenId }: Sender, { reason, workOrder, changedBy, together }: VersionFields): Explaining[] {
  if (tokenId !== null || together === 'yes' || !(reason || workOrder)) return []
  if (personQueries(db).byId.get({ id: personId })?.shared !== false) return []
  return [{ byPerson: personId, text: reason || `Work order ${workOrder}`, workOrder: workOrder || null, madeBy: changedBy || null }]
}

/** The file was sent for one axis and its serial sits at another. */
export function otherAxis(db: VaultDb, write: Write, { axis, site }: Pick<AxisPlace, 'axis' | 'site'>, fields: VersionFields, version: Pick<VersionRow, 'id' | 'baseId'>): Raised[] {
  const named = otherAxisNamed(db, write.actor, fields, axis.id)
  if (named === null) return []
  const says = `A file sent for ${named} holds the serial of the unit at ${axis.tag}: it was stored at ${axis.tag}`
  return [raiseFinding(db, write, {
    cause: 'axis-disagrees', causeKey: `axis:${axis.id}:named:${named}`, siteId: site.id, weight: 'motion', title: says, showings: [{ axisId: axis.id, versionId: version.id, baseId: version.baseId, says }],
  })]
}

/** The axis that a file was sent for, where its serial sits at another; by its tag if the sender may see it, else as it was sent. */
export function otherAxisNamed(db: VaultDb, actor: Actor, { axis }: Pick<VersionFields, 'axis'>, storedAt: number): string | null {
  if (axis === undefined) return null
  const named = axisNamed(db, axis)
  if (named?.axis.id === storedAt) return null
  return named && seesSite(actor, named.site.id) ? named.axis.tag : axis
}

/** A version that is still off goes into the finding that says so. */
function addToOff(db: VaultDb, write: Write, { id, axisId, number }: VersionRow): void {
  const state = readAxisState(db, axisId)
  if (state?.status !== 'off' || state.knownGoodId === null) return
  const open = findingQueries(db).openByCause.get({ causeKey: offKey(axisId, state.knownGoodId) })
  const marked = state.knownGoodVersionId === null ? undefined : versionQueries(db).byId.get({ id: state.knownGoodVersionId })
  if (open) addShowing(db, write, open.id, { axisId, versionId: id, baseId: marked?.id ?? null, says: `v${number} is still off known-good v${marked?.number ?? '?'}` })
}
