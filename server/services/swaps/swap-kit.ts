import type { SwapKit } from '#shared/api/swaps'
import { Refusal } from '#shared/errors/refusal'
import { hashesOf } from '#shared/settings/hash'
import { serialToBeWritten } from '#shared/settings/identity'
import { kitOf } from '#shared/swap/kit'
import { firstMotion } from '#shared/swap/first-motion'
import type { Vault } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import type { SwapRow } from '#server/database/swap/table'
import { identityOf } from '../kit/fit'
import { sha256 } from '#server/database/sha256'
import { versionRow } from '../versions/read-version'
import { contentOnWire } from '../wire'
import { carryCase, kitCaseOf, placeOf } from './sides'
import { swapRow } from './take-step'

/** Reduced speed of the first motion where nobody says another, in %. */
const usualSpeed = 10

/** What goes into the new unit, as the page keeps it while there is no network; as it stands before there is a unit in. */
export function readSwapKit({ db }: Vault, id: number, speedPercent = usualSpeed): SwapKit {
  const row = swapRow(db, id)
  if (row.sourceVersionId === null) throw new Refusal('no-known-good', 'There is nothing to bring over.')
  const goes = kitCaseOf(db, row)
  const { kit, carry } = goes ?? asItStands(db, row)
  const { nameplate } = carry.into
  const version = versionRow(db, row.sourceVersionId)
  return {
    content: contentOnWire(kit.content), unit: goes ? { ...identityOf(goes.unit) } : { serial: serialToBeWritten, model: version.model }, scribeCode: hashesOf(kit.content, sha256).scribeCode,
    carried: kit.carried.map(each => ({ ...each })), teach: [...kit.teach], prove: [...kit.prove], speedPercent,
    firstMotion: firstMotion({ content: kit.content, flags: placeOf(db, row.axisId).axis.flags, speedPercent, ...(nameplate ? { nameplate } : {}) })
      .map(item => ({ ...item, moves: [...item.moves], inputs: item.inputs === null ? null : [...item.inputs] })),
  }
}

/** Before there is a unit in: as for one of the same model and firmware. */
function asItStands(db: VaultDb, row: SwapRow) {
  const version = versionRow(db, row.sourceVersionId ?? 0)
  const source = readContent(db, version.contentId)
  const { out } = carryCase(db, version, { id: 0, model: version.model, firmware: version.firmware, actuatorModel: null }, row)
  const carry = { replaced: row.replaced, ownValues: false, out, into: out }
  return { kit: kitOf(source, carry), carry }
}
