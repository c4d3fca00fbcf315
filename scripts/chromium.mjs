import { execFileSync, spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'

const candidates = [process.env.CHROMIUM_PATH, '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'].filter(Boolean)

/** Path of a Chromium on this machine, or undefined. `CHROMIUM_PATH` stands first. */
export function findChromium() {
  return candidates.find(path => existsSync(path))
}

/** The browser tests need a Chromium: finds it, or installs Debian's as root, or stops and says how. */
export function needChromium() {
  const found = findChromium()
  if (found) return found
  if (process.getuid?.() !== 0 || spawnSync('apt-get', ['--version']).status !== 0) {
    console.error('The browser tests need Chromium. On Debian: sudo apt-get install chromium. Elsewhere: set CHROMIUM_PATH to a Chromium.')
    process.exit(1)
  }
  console.log('Chromium is missing: installing Debian\'s package chromium …')
  const environment = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  execFileSync('apt-get', ['update', '-qq'], { stdio: 'inherit', env: environment })
  execFileSync('apt-get', ['install', '-y', '-qq', 'chromium'], { stdio: 'inherit', env: environment })
  const installed = findChromium()
  if (!installed) {
    console.error('Debian\'s chromium was installed, but /usr/bin/chromium is not there. Set CHROMIUM_PATH.')
    process.exit(1)
  }
  return installed
}
