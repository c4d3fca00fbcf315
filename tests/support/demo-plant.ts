import { spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { plantFile } from '../../scripts/demo-files'
import { startServer, type TestServer } from './server'

export interface DemoPlant {
  readonly server: TestServer
  readonly person: (key: 'planner' | 'technician' | 'auditor' | 'admin') => { readonly name: string, readonly email: string, readonly password: string }
  readonly stop: () => Promise<void>
}

/** The invented plant of `npm run demo`, filled into a folder of its own and served. */
export async function serveDemo(): Promise<DemoPlant> {
  const folder = mkdtempSync(join(tmpdir(), 'witnessmark-demo-'))
  const root = new URL('../..', import.meta.url)
  const filled = spawnSync('npx', ['tsx', '--tsconfig', 'scripts/tsconfig.json', 'scripts/fill-demo.ts', folder], { cwd: root, encoding: 'utf8' })
  if (filled.status !== 0) throw new Error(`The demo plant was not filled: ${filled.stderr}`)
  const server = await startServer({ folder })
  const people = new Map(plantFile().people.map(person => [person.key, person]))
  return {
    server,
    person: (key) => {
      const found = people.get(key)
      if (!found) throw new Error(`The demo plant has no ${key}.`)
      return found
    },
    stop: async () => {
      await server.stop()
      rmSync(folder, { recursive: true, force: true })
    },
  }
}
