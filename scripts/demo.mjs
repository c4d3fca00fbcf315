import { spawn, spawnSync } from 'node:child_process'
import { readFileSync, readdirSync, rmSync, statSync } from 'node:fs'
import { join } from 'node:path'

/*
 * `npm run demo`: builds where the build is older than the sources, fills the invented plant into a data folder of its own
 * (once; `-- --fresh` begins anew), serves it, and says where and who.
 */

const folder = join('data', 'demo')
const port = process.env.PORT ?? '3000'
const output = join('.output', 'server', 'index.mjs')
const sources = ['app.vue', 'error.vue', 'nuxt.config.ts', 'package.json', 'tailwind.config.ts', 'assets', 'components', 'composables', 'layouts', 'middleware', 'modules', 'pages', 'public', 'server', 'shared', 'stores', 'utils', 'app']

function newest(path) {
  const stat = statSync(path, { throwIfNoEntry: false })
  if (!stat) return 0
  if (!stat.isDirectory()) return stat.mtimeMs
  return Math.max(stat.mtimeMs, ...readdirSync(path).map(name => newest(join(path, name))))
}

function run(command, args) {
  const { status } = spawnSync(command, args, { stdio: 'inherit' })
  if (status !== 0) process.exit(status ?? 1)
}

if (process.argv.includes('--fresh')) rmSync(folder, { recursive: true, force: true })
if (newest(output) < Math.max(...sources.map(newest))) {
  console.log('Building, about a minute …')
  run('npx', ['nuxt', 'build', '--logLevel', 'silent'])
}
run('npx', ['tsx', '--tsconfig', 'scripts/tsconfig.json', 'scripts/fill-demo.ts', folder])

const server = spawn(process.execPath, [output], { stdio: ['inherit', 'ignore', 'inherit'], env: { ...process.env, WITNESSMARK_DATA: folder, PORT: port } })
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => server.kill(signal))
server.on('exit', code => process.exit(code ?? 0))

const origin = `http://localhost:${port}`
await answered(`${origin}/api/health`)
const { people } = JSON.parse(readFileSync(join('fixtures', 'larkfield', 'plant.json'), 'utf8'))
console.log(`\nLarkfield Preserves, an invented plant, is served at ${origin}\n`)
for (const { roles, email, password } of people) console.log(`  ${roles[0].padEnd(11)} ${email.padEnd(26)} ${password}`)
console.log('\nCtrl+C ends it; the next `npm run demo` goes on with it.')

async function answered(address) {
  for (let attempt = 0; attempt < 100; attempt += 1) {
    const answer = await fetch(address).catch(() => null)
    if (answer?.ok) return
    await new Promise(resolve => setTimeout(resolve, 100))
  }
  console.error(`The server did not answer at ${address}. Is another one on port ${port}? Set PORT.`)
  server.kill()
  process.exit(1)
}
