import { readFileSync } from 'node:fs'
import { OpenError } from '#server/database/read-only'
import { verifyVault, type VerifyOptions } from '#server/services/verify/verify'

/*
 * npm run verify [-- FOLDER] [--derived] [--reread] [--checkpoint FILE]…
 *
 * Recomputes a vault from the bytes up; reads only, also beside a running server. Ends with 0 where it is sound, 1 where it is
 * damaged, 2 where the call makes no sense, 10 where there is no vault, 11 where it is locked.
 */
const exit = { sound: 0, damage: 1, usage: 2, noVault: 10, locked: 11 } as const

interface Call { readonly folder: string, readonly options: VerifyOptions }

function readCall(given: readonly string[]): Call | string {
  const rest = [...given]
  const checkpoints: { from: string, note: string }[] = []
  let folder: string | undefined
  let [derived, reread] = [false, false]
  for (let word = rest.shift(); word !== undefined; word = rest.shift()) {
    if (word === '--derived') derived = true
    else if (word === '--reread') reread = true
    else if (word === '--checkpoint') {
      const file = rest.shift()
      if (file === undefined) return '--checkpoint wants a file.'
      checkpoints.push({ from: file, note: readFileSync(file, 'utf8') })
    }
    else if (word.startsWith('-')) return `${word} is no option: --derived, --reread, --checkpoint FILE.`
    else if (folder === undefined) folder = word
    else return 'One folder at a time.'
  }
  return { folder: folder ?? process.env.WITNESSMARK_DATA ?? './data', options: { derived, reread, checkpoints } }
}

async function run(): Promise<number> {
  const call = readCall(process.argv.slice(2))
  if (typeof call === 'string') {
    console.error(call)
    return exit.usage
  }
  try {
    const { entries, rows, faults, found, derived, reread } = await verifyVault(call.folder, call.options)
    console.log(`${entries} entries, ${rows} records held against them.`)
    if (derived) console.log(`${derived.versions} versions compared again, ${derived.judgements} judgements made again, ${derived.older} by an older engine left alone.`)
    if (reread) console.log(`${reread.files} files read again, ${reread.other} by a reader that is not today's; ${reread.notes.length} read differently today.`)
    for (const note of reread?.notes ?? []) console.log(`note: ${note}`)
    for (const { record, fault } of found) console.error(`${record} ${fault}`)
    if (faults > found.length) console.error(`and ${faults - found.length} more`)
    console.log(faults === 0 ? 'Sound.' : `Damage: ${faults} ${faults === 1 ? 'fault' : 'faults'}.`)
    return faults === 0 ? exit.sound : exit.damage
  }
  catch (error) {
    if (!(error instanceof OpenError)) throw error
    console.error(error.message)
    return error.code === 'locked' ? exit.locked : exit.noVault
  }
}

process.exitCode = await run()
