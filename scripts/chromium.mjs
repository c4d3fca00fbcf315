import { existsSync } from 'node:fs'
import { installDebian } from './debian.mjs'

const candidates = [process.env.CHROMIUM_PATH, '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'].filter(Boolean)

/** Path of a Chromium on this machine, or undefined. `CHROMIUM_PATH` stands first. */
export function findChromium() {
  return candidates.find(path => existsSync(path))
}

/** The browser tests need a Chromium: finds it, or installs Debian's as root, or stops and says how. */
export function needChromium() {
  const found = findChromium()
  if (found) return found
  installDebian('chromium', 'The browser tests need Chromium.', 'Elsewhere: set CHROMIUM_PATH to a Chromium.')
  const installed = findChromium()
  if (!installed) {
    console.error('Debian\'s chromium was installed, but /usr/bin/chromium is not there. Set CHROMIUM_PATH.')
    process.exit(1)
  }
  return installed
}
