import { z } from 'zod'
import * as attachments from './attachments'
import * as board from './board'
import { axisParams, created, idParams, listQuery, pageOf, roles, type Role } from './common'
import * as findings from './findings'
import * as history from './history'
import * as judging from './judging'
import * as letters from './letters'
import * as neighbours from './neighbours'
import * as labels from './labels'
import * as lineFolders from './line-folders'
import * as people from './people'
import * as places from './places'
import * as reports from './reports'
import * as swaps from './swaps'
import * as trail from './trail'
import * as uploads from './uploads'
import * as values from './values'
import * as versions from './versions'
import * as waivers from './waivers'

/*
 * The one table of routes: who may call, what goes in, what comes out. A handler that is not in it does not build, a call
 * that it does not allow does not reach a handler.
 */

/** Whose site must be among the caller's: found from `params.id`. Others answer 404, as if they were not there. */
export type Scope = 'site' | 'line' | 'machine' | 'axis' | 'version' | 'unit' | 'fitting' | 'rule' | 'tray' | 'waiver' | 'attachment' | 'finding' | 'swap'

export interface RouteDeclaration {
  /** 'anyone' needs no sign-in; 'signed-in' any role. */
  readonly may: 'anyone' | 'signed-in' | readonly Role[]
  /** A script's token with this scope may call it, whatever roles its owner has. */
  readonly token?: 'upload' | 'read'
  /** The body carries the password again; a token or a shared account never signs. */
  readonly sign?: true
  readonly scope?: Scope
  readonly params?: z.ZodType
  readonly query?: z.ZodType
  /** JSON body; 'file' = a settings file, 'attachment' = any file, both raw or multipart, streamed. */
  readonly body?: z.ZodType | 'file' | 'attachment'
  readonly answers: Readonly<Record<number, z.ZodType | 'file'>>
  /** One line for the interface page. */
  readonly says: string
}

const all = [...roles] as const
const uploaders = ['technician', 'planner'] as const
const planner = ['planner'] as const
const admin = ['admin'] as const
const binders = ['planner', 'auditor'] as const
const trailReaders = ['planner', 'auditor', 'admin'] as const
const none = z.object({})

export const routes = {
  'GET /api/health': { may: 'anyone', answers: { 200: board.healthSchema, 503: board.healthSchema }, says: 'Whether the vault answers and can be written.' },
  'GET /api/openapi.json': { may: 'anyone', answers: { 200: z.unknown() }, says: 'This table as OpenAPI 3.1.' },
  'GET /api/format/schema.json': { may: 'anyone', answers: { 200: z.unknown() }, says: 'The settings format as JSON Schema (draft 2020-12).' },
  'POST /api/set-up': { may: 'anyone', body: people.setUpBody, answers: { 200: people.meSchema }, says: 'Makes the first administrator, once, with the address printed at the first start.' },
  'POST /api/sign-in': { may: 'anyone', body: people.signInBody, answers: { 200: people.meSchema }, says: 'Begins a session; 429 after 10 failures an account or 60 an address in 15 minutes.' },
  'POST /api/sign-out': { may: 'signed-in', answers: { 204: none }, says: 'Ends this session at once.' },
  'GET /api/me': { may: 'signed-in', token: 'read', answers: { 200: people.meSchema }, says: 'Who is asking, and for which sites.' },
  'POST /api/me/password': { may: 'signed-in', body: people.ownPasswordBody, answers: { 204: none }, says: 'A new password of one’s own; ends all other sessions.' },

  'GET /api/me/letters': { may: 'signed-in', answers: { 200: letters.ownLetters }, says: 'Which letters one gets, and which places one watches.' },
  'POST /api/me/letters': { may: 'signed-in', body: letters.letterChoiceBody, answers: { 200: letters.ownLetters }, says: 'Chooses whether to get letters of a kind, within what one’s roles and sites allow.' },
  'POST /api/me/watches': { may: 'signed-in', body: letters.watchBody, answers: { 200: letters.ownLetters }, says: 'Watches an axis, a machine, a line or a site, or no more.' },

  'GET /api/people': { may: admin, query: listQuery, answers: { 200: pageOf(people.personSchema) }, says: 'All people, those who left too.' },
  'POST /api/people': { may: admin, body: people.personBody, answers: { 201: created }, says: 'Registers a person.' },
  'PATCH /api/people/:id': { may: admin, params: idParams, body: people.personPatch, answers: { 200: people.personSchema }, says: 'Changes a person; holds at once.' },
  'GET /api/people/names': { may: uploaders, answers: { 200: z.object({ items: z.array(z.object({ id: z.int(), name: z.string() })) }) }, says: 'Names to choose from for changed by and allowed by.' },
  'GET /api/tokens': { may: admin, query: listQuery, answers: { 200: pageOf(people.tokenSchema) }, says: 'Tokens of scripts, without their secrets.' },
  'POST /api/tokens': { may: admin, body: people.tokenBody, answers: { 201: people.tokenMade }, says: 'Makes a token; it is shown once.' },
  'POST /api/tokens/:id/end': { may: admin, params: idParams, answers: { 200: people.tokenSchema }, says: 'Ends a token at once.' },

  'GET /api/letters': { may: admin, query: letters.letterQuery, answers: { 200: letters.letterPage }, says: 'Letters, newest first, what became of each, and how many wait since when.' },
  'GET /api/letters/:id': { may: admin, params: idParams, answers: { 200: letters.letterOne }, says: 'One letter with its text.' },
  'GET /api/letters/:id/file': { may: admin, params: idParams, answers: { 200: 'file' }, says: 'The letter as it leaves, an .eml file.' },
  'POST /api/letters/:id/send-again': { may: admin, params: idParams, answers: { 200: letters.letterSchema }, says: 'Sends a letter again at once; who may have it is judged again.' },

  'GET /api/sites': { may: all, token: 'read', query: listQuery, answers: { 200: pageOf(places.siteSchema) }, says: 'Sites.' },
  'POST /api/sites': { may: planner, body: places.siteBody, answers: { 201: created }, says: 'Registers a site; only by people without site bounds.' },
  'GET /api/sites/:id': { may: all, token: 'read', scope: 'site', params: idParams, answers: { 200: places.siteSchema }, says: 'One site.' },
  'PATCH /api/sites/:id': { may: planner, scope: 'site', params: idParams, body: places.sitePatch, answers: { 200: places.siteSchema }, says: 'Changes a site and its terms.' },
  'GET /api/lines': { may: all, token: 'read', query: places.placeQuery, answers: { 200: pageOf(places.lineSchema) }, says: 'Lines.' },
  'POST /api/lines': { may: planner, body: places.lineBody, answers: { 201: created }, says: 'Registers a line.' },
  'GET /api/lines/:id': { may: all, token: 'read', scope: 'line', params: idParams, answers: { 200: places.lineSchema }, says: 'One line.' },
  'PATCH /api/lines/:id': { may: planner, scope: 'line', params: idParams, body: places.linePatch, answers: { 200: places.lineSchema }, says: 'Changes a line.' },
  'GET /api/lines/:id/folder': { may: all, token: 'read', scope: 'line', params: idParams, query: lineFolders.folderQuery, answers: { 200: 'file' }, says: 'A ZIP that restores its axes without the vault: made now, or kept=true for that of last night.' },
  'GET /api/line-folders': { may: all, token: 'read', answers: { 200: lineFolders.folderList }, says: 'Each line with the folder that was kept last: when, how large, or why none.' },
  'GET /api/machines': { may: all, token: 'read', query: places.placeQuery, answers: { 200: pageOf(places.machineSchema) }, says: 'Machines.' },
  'POST /api/machines': { may: planner, body: places.machineBody, answers: { 201: created }, says: 'Registers a machine.' },
  'GET /api/machines/:id': { may: all, token: 'read', scope: 'machine', params: idParams, answers: { 200: places.machineSchema }, says: 'One machine.' },
  'GET /api/machines/:id/neighbours': { may: all, token: 'read', scope: 'machine', params: idParams, answers: { 200: neighbours.neighboursAnswer }, says: 'What its axes are held against as they stand now: sister axes of the site, and who shares their buses.' },
  'PATCH /api/machines/:id': { may: planner, scope: 'machine', params: idParams, body: places.machinePatch, answers: { 200: places.machineSchema }, says: 'Changes a machine.' },

  'GET /api/axes': { may: all, token: 'read', query: places.placeQuery, answers: { 200: pageOf(versions.axisSchema) }, says: 'Axes with their state.' },
  'POST /api/axes': { may: planner, body: places.axisBody, answers: { 201: created }, says: 'Registers an axis.' },
  'GET /api/axes/:id': { may: all, token: 'read', scope: 'axis', params: axisParams, answers: { 200: versions.axisSchema }, says: 'One axis, by id or tag:TAG.' },
  'PATCH /api/axes/:id': { may: planner, scope: 'axis', params: axisParams, body: places.axisPatch, answers: { 200: versions.axisSchema }, says: 'Changes an axis; its history stays under a new tag.' },
  'GET /api/axes/:id/versions': { may: all, token: 'read', scope: 'axis', params: axisParams, query: listQuery, answers: { 200: pageOf(versions.versionSchema) }, says: 'Its versions, newest number first.' },
  'GET /api/axes/:id/versions/:number': { may: all, token: 'read', scope: 'axis', params: versions.versionRef, answers: { 200: versions.versionOne }, says: 'One version by its number on the axis.' },
  'GET /api/axes/:id/life': { may: all, token: 'read', scope: 'axis', params: axisParams, query: listQuery, answers: { 200: pageOf(versions.lifeEvent) }, says: 'What happened to it, newest first.' },
  'GET /api/axes/:id/as-of': { may: all, token: 'read', scope: 'axis', params: axisParams, query: versions.asOfQuery, answers: { 200: z.object({ version: versions.versionSchema.nullable() }) }, says: 'What was current at an instant, by what had been received by then.' },
  'GET /api/axes/:id/values': { may: all, token: 'read', scope: 'axis', params: axisParams, query: values.valuesQuery, answers: { 200: values.valuesAnswer }, says: 'One value over all versions: each step with who and why, what was known-good, and the bounds of rules and nameplate.' },
  'GET /api/axes/:id/fittings': { may: all, token: 'read', scope: 'axis', params: axisParams, answers: { 200: z.object({ items: z.array(places.fittingSchema) }) }, says: 'Which units sat there, newest first.' },
  'POST /api/axes/:id/known-good/none': { may: planner, scope: 'axis', sign: true, params: axisParams, body: versions.knownGoodBody, answers: { 201: created }, says: 'Says that no version is known-good; signed.' },
  'POST /api/axes/:id/kit': { may: uploaders, scope: 'axis', params: axisParams, body: versions.kitBody, answers: { 200: 'file' }, says: 'The known-good values as a file for a replacement unit; logged.' },
  'GET /api/axes/:id/label': { may: all, token: 'read', scope: 'axis', params: axisParams, query: labels.labelQuery, answers: { 200: labels.labelList }, says: 'What stands on its label, or the label as PDF in true size.' },
  'POST /api/axes/:id/label': { may: uploaders, scope: 'axis', params: axisParams, body: labels.labelBody, answers: { 201: created }, says: 'Says that a label with its tag of today was printed; readiness counts it.' },

  'GET /api/units': { may: all, token: 'read', query: places.unitQuery, answers: { 200: pageOf(places.unitSchema) }, says: 'Units and spares.' },
  'POST /api/units': { may: planner, body: places.unitBody, answers: { 201: created }, says: 'Registers a unit.' },
  'GET /api/units/:id': { may: all, token: 'read', scope: 'unit', params: idParams, answers: { 200: places.unitSchema }, says: 'One unit.' },
  'PATCH /api/units/:id': { may: planner, scope: 'unit', params: idParams, body: places.unitPatch, answers: { 200: places.unitSchema }, says: 'Changes a unit; its state moves are logged.' },
  'POST /api/fittings': { may: planner, body: places.fittingBody, answers: { 201: created }, says: 'A unit sits at an axis since; 409 overlaps.' },
  'POST /api/fittings/:id/end': { may: planner, scope: 'fitting', params: idParams, body: places.fittingEndBody, answers: { 200: places.fittingSchema }, says: 'The unit was taken out, and what it is now.' },
  'GET /api/nameplates': { may: all, token: 'read', query: listQuery, answers: { 200: pageOf(places.nameplateRecord) }, says: 'Models, each with its newest revision.' },
  'POST /api/nameplates': { may: planner, body: places.nameplateBody, answers: { 201: created }, says: 'Registers a model.' },
  'GET /api/nameplates/:id': { may: all, token: 'read', params: idParams, answers: { 200: places.nameplateRecord }, says: 'The model of that revision, newest revision.' },
  'PATCH /api/nameplates/:id': { may: planner, params: idParams, body: places.nameplatePatch, answers: { 200: places.nameplateRecord }, says: 'Adds a revision that differs in what is named; null clears.' },
  'GET /api/nameplates/:id/revisions': { may: all, token: 'read', params: idParams, answers: { 200: z.object({ items: z.array(places.nameplateRevision) }) }, says: 'All revisions, newest first.' },
  'GET /api/rules': { may: all, token: 'read', query: listQuery, answers: { 200: pageOf(places.ruleSchema) }, says: 'Site rules, ended ones too.' },
  'POST /api/rules': { may: planner, body: places.ruleBody, answers: { 201: created }, says: 'Narrows a field for a site, a machine or an axis.' },
  'POST /api/rules/:id/end': { may: planner, scope: 'rule', params: idParams, body: places.ruleEndBody, answers: { 200: places.ruleSchema }, says: 'The rule holds no more.' },
  'POST /api/waivers': { may: planner, sign: true, body: waivers.waiverBody, answers: { 201: created }, says: 'Accepts a stop, or what could not be judged, of an axis for as long as the value stays; signed, with an end.' },
  'GET /api/axes/:id/waivers': { may: all, token: 'read', scope: 'axis', params: axisParams, query: listQuery, answers: { 200: pageOf(waivers.waiverSchema) }, says: 'What was accepted there, ended waivers too, newest first.' },
  'POST /api/waivers/:id/end': { may: planner, scope: 'waiver', sign: true, params: idParams, body: waivers.waiverEndBody, answers: { 200: waivers.waiverSchema }, says: 'The waiver holds no more; signed.' },
  'POST /api/judging-runs': { may: planner, answers: { 201: created }, says: 'Begins to judge the current version of every axis again, by today’s nameplates and rules.' },
  'GET /api/judging-runs/:id': { may: planner, params: idParams, query: judging.runQuery, answers: { 200: judging.runSchema }, says: 'How far a run of one’s own has come, and what it changed; kept until the vault restarts.' },

  'GET /api/judging-context': { may: all, token: 'read', query: uploads.judgingQuery, answers: { 200: uploads.judgingContext }, says: 'What a file of this serial is read against.' },
  'POST /api/uploads/preview': { may: uploaders, token: 'upload', query: uploads.uploadFields, body: 'file', answers: { 200: uploads.previewAnswer }, says: 'As an upload, and writes nothing.' },
  'POST /api/uploads': { may: uploaders, token: 'upload', query: uploads.uploadFields, body: 'file', answers: { 200: uploads.uploadSeen, 201: uploads.uploadStored, 202: uploads.uploadTray }, says: 'Stores a settings file: a version, a sighting, or the tray.' },
  'GET /api/tray': { may: uploaders, query: listQuery, answers: { 200: pageOf(uploads.trayItem) }, says: 'Files that wait for a person, oldest first.' },
  'GET /api/tray/:id/file': { may: uploaders, scope: 'tray', params: idParams, answers: { 200: 'file' }, says: 'The file as it came.' },
  'POST /api/tray/:id/assign': { may: uploaders, scope: 'tray', params: idParams, body: uploads.trayAssignBody, answers: { 200: uploads.trayAssigned, 201: uploads.trayAssigned }, says: 'Says where it belongs; a unit not fitted there is fitted, which takes a planner.' },
  'POST /api/tray/:id/discard': { may: uploaders, scope: 'tray', params: idParams, body: uploads.trayDiscardBody, answers: { 204: none }, says: 'Sets it aside with a reason; the bytes stay.' },

  'GET /api/versions/:id': { may: all, token: 'read', scope: 'version', params: idParams, answers: { 200: versions.versionOne }, says: 'One version, whole.' },
  'GET /api/versions/:id/file': { may: all, token: 'read', scope: 'version', params: idParams, query: versions.fileQuery, answers: { 200: 'file' }, says: 'Its file in either form, or byte for byte as it came.' },
  'GET /api/versions/:id/changes': { may: all, token: 'read', scope: 'version', params: idParams, query: versions.changesQuery, answers: { 200: versions.changesAnswer }, says: 'against = before, the path = after; as a list, JSON Patch or text.' },
  'GET /api/versions/:id/attachments': { may: all, token: 'read', scope: 'version', params: idParams, answers: { 200: attachments.attachmentList }, says: 'Files kept with it: a drive tool’s own backup, photos.' },
  'POST /api/versions/:id/attachments': { may: uploaders, token: 'upload', scope: 'version', params: idParams, query: attachments.attachmentFields, body: 'attachment', answers: { 201: attachments.attachmentSchema }, says: 'Keeps a file of up to 20 MiB with it, unread and for good.' },
  'GET /api/attachments/:id/file': { may: all, token: 'read', scope: 'attachment', params: idParams, answers: { 200: 'file' }, says: 'The attachment byte for byte; cut short where the stored bytes are not those that came in.' },
  'POST /api/versions/:id/known-good': { may: planner, scope: 'version', sign: true, params: idParams, body: versions.knownGoodBody, answers: { 201: created }, says: 'What this axis is restored to from now on; signed, four eyes.' },
  'POST /api/versions/:id/void': { may: planner, scope: 'version', sign: true, params: idParams, body: versions.voidBody, answers: { 201: created }, says: 'A wrong upload; stays readable. Signed.' },
  'POST /api/versions/:id/judge': { may: planner, scope: 'version', params: idParams, answers: { 201: judging.judgedAgain }, says: 'Judges it by today’s nameplate and rules; the judgements before stay.' },

  'GET /api/findings': { may: all, token: 'read', query: findings.findingQuery, answers: { 200: pageOf(findings.findingSchema) }, says: 'What a person must explain, newest first.' },
  'GET /api/findings/:id': { may: all, token: 'read', scope: 'finding', params: idParams, answers: { 200: findings.findingSchema }, says: 'One finding with all that was said of it.' },
  'POST /api/findings/:id/explain': { may: ['technician', 'planner', 'auditor'], scope: 'finding', params: idParams, body: findings.explainBody, answers: { 200: findings.findingSchema }, says: 'Says why; under a name of one’s own.' },
  'POST /api/findings/:id/close': { may: ['planner', 'auditor'], scope: 'finding', sign: true, params: idParams, body: findings.closeBody, answers: { 200: findings.findingSchema }, says: 'Closes it as accepted or put right; signed, never by who explained it, harm by auditors only.' },
  'POST /api/findings/:id/reopen': { may: ['planner', 'auditor'], scope: 'finding', params: idParams, body: findings.reopenBody, answers: { 200: findings.findingSchema }, says: 'Opens it again; all that was said stays.' },
  'GET /api/planned-changes': { may: all, token: 'read', query: listQuery, answers: { 200: pageOf(findings.plannedChangeSchema) }, says: 'Changes announced before they are made, newest first, and what came of each.' },
  'POST /api/planned-changes': { may: planner, body: findings.plannedChangeBody, answers: { 201: created }, says: 'Announces a change: what it covers is explained when it is seen.' },
  'GET /api/planned-changes/:id': { may: all, token: 'read', params: idParams, answers: { 200: findings.plannedChangeSchema }, says: 'One of them.' },
  'POST /api/planned-changes/:id/end': { may: planner, params: idParams, body: findings.plannedChangeEndBody, answers: { 200: findings.plannedChangeSchema }, says: 'Calls it off; what came of it stays.' },
  'GET /api/swaps': { may: all, token: 'read', query: swaps.swapQuery, answers: { 200: pageOf(swaps.swapLine) }, says: 'Swaps, newest first; of one axis, open ones, ended ones.' },
  'POST /api/swaps': { may: uploaders, body: swaps.swapOpenBody, answers: { 201: swaps.swapSchema }, says: 'Begins a swap; 409 swap-open where the axis has one.' },
  'GET /api/swaps/:id': { may: all, token: 'read', scope: 'swap', params: idParams, answers: { 200: swaps.swapSchema }, says: 'One swap, as it stands.' },
  'GET /api/swaps/:id/spares': { may: all, token: 'read', scope: 'swap', params: idParams, answers: { 200: swaps.sparesAnswer }, says: 'Spares in stock for it, those that fit first.' },
  'GET /api/swaps/:id/kit': { may: uploaders, scope: 'swap', params: idParams, query: swaps.swapKitQuery, answers: { 200: swaps.swapKitAnswer }, says: 'What goes into the new unit, what is taught and proved there, and the list of the first motion.' },
  'POST /api/swaps/:id/source': { may: uploaders, scope: 'swap', params: idParams, body: swaps.swapSourceBody, answers: { 200: swaps.swapSchema }, says: 'Says which version goes to the new unit: the known-good, or the as-found one; until safe.' },
  'POST /api/swaps/:id/unit-in': { may: uploaders, scope: 'swap', params: idParams, body: swaps.unitInBody, answers: { 200: swaps.swapSchema }, says: 'With which unit; answers whether it fits and what changes. May be sent again until safe.' },
  'POST /api/swaps/:id/cautions': { may: uploaders, scope: 'swap', params: idParams, body: swaps.cautionsBody, answers: { 200: swaps.swapSchema }, says: 'The cautions were read: kits of this swap may be taken.' },
  'POST /api/swaps/:id/ticks': { may: uploaders, scope: 'swap', params: idParams, body: swaps.ticksBody, answers: { 200: swaps.swapSchema }, says: 'Ticks what is done between two steps: kit in hand, a line written, a verdict read.' },
  'POST /api/swaps/:id/safe': { may: uploaders, scope: 'swap', params: idParams, body: swaps.safeBody, answers: { 200: swaps.swapSchema }, says: 'Isolated, blocked, fitted and checked.' },
  'POST /api/swaps/:id/read-back': { may: uploaders, scope: 'swap', params: idParams, query: swaps.readBackQuery, body: 'file', answers: { 200: swaps.readBackAnswer }, says: 'What the unit holds, against the kit; every attempt is kept, those turned away too.' },
  'POST /api/swaps/:id/missing-keys': { may: uploaders, scope: 'swap', params: idParams, body: swaps.missingKeysBody, answers: { 200: swaps.swapSchema }, says: 'Accepts keys that this firmware has no place for, once for all units of the model and firmware.' },
  'POST /api/swaps/:id/first-motion': { may: uploaders, scope: 'swap', params: idParams, body: swaps.firstMotionBody, answers: { 200: swaps.swapSchema }, says: 'Results of the first motion, any number at a time.' },
  'POST /api/swaps/:id/note': { may: uploaders, scope: 'swap', params: idParams, body: swaps.noteBody, answers: { 200: swaps.swapSchema }, says: 'Keeps the hand-over note as far as it is written.' },
  'POST /api/swaps/:id/running': { may: uploaders, scope: 'swap', params: idParams, body: swaps.runningBody, answers: { 200: swaps.swapSchema }, says: 'The axis runs, not released.' },
  'POST /api/swaps/:id/release': { may: planner, scope: 'swap', sign: true, params: idParams, body: swaps.releaseBody, answers: { 200: swaps.swapSchema }, says: 'Released, and the mark carries over where the values are the same; signed, by another than who read back.' },
  'POST /api/swaps/:id/abandon': { may: uploaders, scope: 'swap', params: idParams, body: swaps.abandonBody, answers: { 200: swaps.swapSchema }, says: 'Ends the swap without a release, and says which unit is truly fitted.' },
  'POST /api/swaps/:id/put-back': { may: uploaders, scope: 'swap', params: idParams, body: swaps.putBackBody, answers: { 200: swaps.swapSchema }, says: 'The old unit goes back in; the same swap goes on.' },

  'GET /api/history': { may: all, token: 'read', query: history.historyQuery, answers: { 200: history.historyPage }, says: 'Who changed what, when, from what to what, why and allowed by whom, newest first; as CSV or PDF the whole result, for planners and auditors.' },
  'GET /api/history/acts': { may: ['planner', 'auditor', 'admin'], token: 'read', query: history.actsQuery, answers: { 200: history.actsPage }, says: 'Who changed sites and what they watch, nameplates, rules, roles and marks, newest first.' },
  'GET /api/history/rests': { may: all, token: 'read', query: history.restsQuery, answers: { 200: history.historyRests }, says: 'What an answer of the history rests on: versions, axes not read, how far the log was verified.' },
  'GET /api/history/not-read': { may: all, token: 'read', query: history.notReadQuery, answers: { 200: history.notReadPage }, says: 'Axes that no file came from in a stretch of time.' },

  'GET /api/reports': { may: binders, token: 'read', query: reports.reportQuery, answers: { 200: pageOf(reports.reportSchema) }, says: 'Audit reports that were asked for, newest first.' },
  'POST /api/reports': { may: binders, body: reports.reportBody, answers: { 201: created }, says: 'Asks for the audit report of a place and a time; logged, with the checkpoint that it will bear.' },
  'GET /api/reports/:id': { may: binders, token: 'read', params: idParams, answers: { 200: reports.reportSchema }, says: 'One of them, and how far its file has come while it is made.' },
  'GET /api/reports/:id/file': { may: binders, token: 'read', params: idParams, query: reports.reportFileQuery, answers: { 200: 'file' }, says: 'The report as PDF or JSON, whole, of what the vault held when it was asked for.' },

  'GET /api/board': { may: all, token: 'read', answers: { 200: board.boardAnswer }, says: 'Every axis with its state, and what needs someone.' },
  'GET /api/log': { may: trailReaders, token: 'read', query: listQuery, answers: { 200: pageOf(board.logEntrySchema) }, says: 'The log, entry by entry; only without site bounds.' },
  'GET /api/log/key': { may: trailReaders, token: 'read', answers: { 200: trail.keyAnswer }, says: 'The public key that checkpoints are signed with.' },
  'GET /api/log/checkpoint': { may: trailReaders, token: 'read', answers: { 200: 'file' }, says: 'How long the log is now and what its root is, as a signed note.' },
  'GET /api/log/file': { may: trailReaders, token: 'read', answers: { 200: 'file' }, says: 'The whole log, one entry a line, for a verifier that trusts nobody.' },
  'GET /api/log/proof': { may: trailReaders, token: 'read', query: trail.proofQuery, answers: { 200: trail.proofAnswer }, says: 'That an entry is in the log of a size.' },
  'GET /api/log/consistency': { may: trailReaders, token: 'read', query: trail.consistencyQuery, answers: { 200: trail.consistencyAnswer }, says: 'That the log of a later size begins with that of an earlier one.' },
  'GET /api/trail': { may: trailReaders, answers: { 200: trail.trailState }, says: 'How long the log is, and what the verifications found.' },
  'POST /api/trail/verifications': { may: ['auditor', 'admin'], answers: { 201: trail.verificationSchema }, says: 'Recomputes the whole vault now and keeps what it found.' },
} as const satisfies Readonly<Record<string, RouteDeclaration>>

export type RouteName = keyof typeof routes
