import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'
import { canonicalText } from '../shared/settings/canonical'
import { hashesOf } from '../shared/settings/hash'
import { readSettings } from '../shared/settings/read'
import { settingsInput } from '../shared/settings/schema'
import { atMost, ratioOf, type Figure } from './figure'
import { sampleFile } from './sample-file'

/*
 * What reading a file costs. The peer of reading is what a service usually does: JSON.parse and one pass of a schema over the
 * result, which knows neither exact decimals nor duplicate keys nor where in the file an error stands, and hashes nothing.
 */

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest()

function read(bytes: Buffer) {
  const outcome = readSettings(bytes)
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.errors))
  return outcome.value
}

/** Reading, canonical text and hashes of a JSON file of 64 moves; and the canonical text alone against a general library. */
export async function measureRead(): Promise<Figure[]> {
  const bytes = sampleFile(0)
  const { content } = read(bytes)
  if (canonicalize(content) !== canonicalText(content)) throw new Error('The two canonical texts differ: their times cannot be compared.')
  const reading = ratioOf(() => {
    const { content: fresh } = read(bytes)
    canonicalText(fresh)
    hashesOf(fresh, sha256)
  }, () => settingsInput.parse(JSON.parse(bytes.toString('utf8'))), 15, 60)
  const canonical = ratioOf(() => canonicalText(content), () => canonicalize(content), 15, 60)
  return [
    atMost(`read, canonical text and hashes of ${Math.floor(bytes.length / 1000)} kB JSON, to JSON.parse and schema`, reading, 2.5),
    atMost('canonical text of 64 moves, to canonicalize', canonical, 0.25),
  ]
}
