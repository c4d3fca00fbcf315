import { spawnSync } from 'node:child_process'
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { needChromium } from './chromium.mjs'
import { needPaperTools } from './paper-tools.mjs'

/*
 * All tests: unit and architecture, mounted pages, then the built server with a real file and a real browser. Counts come
 * from the runner's own report; a file that could not even be loaded counts as one failure.
 */

const folder = 'node_modules/.cache/witnessmark'
const reportFile = `${folder}/vitest.json`
mkdirSync(folder, { recursive: true })
rmSync(reportFile, { force: true })

needPaperTools()
const environment = { ...process.env, CHROMIUM_PATH: needChromium() }
const run = (command, ...args) => spawnSync(command, args, { stdio: 'inherit', env: environment }).status ?? 1

const built = run('npx', 'nuxt', 'build')
const tested = built === 0
  ? run('npx', 'vitest', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${reportFile}`, ...process.argv.slice(2))
  : 1

const count = { passed: 0, failed: 0 }
if (built === 0) {
  const report = JSON.parse(readFileSync(reportFile, 'utf8'))
  count.passed = report.numPassedTests
  count.failed = report.numFailedTests + report.testResults.filter(file => file.status === 'failed' && file.assertionResults.length === 0).length
}
if ((built !== 0 || tested !== 0) && count.failed === 0) count.failed = 1
writeFileSync(`${folder}/count.json`, JSON.stringify(count))
console.log(`${count.passed} passed, ${count.failed} failed`)
process.exit(count.failed === 0 && tested === 0 ? 0 : 1)
