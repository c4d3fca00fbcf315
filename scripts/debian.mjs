import { execFileSync, spawnSync } from 'node:child_process'

/** Installs a Debian package as root; elsewhere stops and says how. `why` is a sentence, `otherwise` what helps on other systems. */
export function installDebian(name, why, otherwise) {
  if (process.getuid?.() !== 0 || spawnSync('apt-get', ['--version']).status !== 0) {
    console.error(`${why} On Debian: sudo apt-get install ${name}. ${otherwise}`)
    process.exit(1)
  }
  console.log(`${name} is missing: installing Debian's package …`)
  const environment = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  execFileSync('apt-get', ['update', '-qq'], { stdio: 'inherit', env: environment })
  execFileSync('apt-get', ['install', '-y', '-qq', name], { stdio: 'inherit', env: environment })
}
