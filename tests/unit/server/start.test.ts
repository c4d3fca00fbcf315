import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { firstStart, isUnclaimed, setUpToken } from '../../../server/services/people/first-start'
import { signIn } from '../../../server/services/people/sign-in'
import { publicOriginOf } from '../../../server/services/start/public-origin'
import { sessionSecret } from '../../../server/services/start/secret'
import { codeOf } from '../../support/codes'
import { freshVault } from '../../support/vault'

describe('the session secret', () => {
  let folder: string
  beforeEach(() => { folder = mkdtempSync(join(tmpdir(), 'witnessmark-')) })
  afterEach(() => { rmSync(folder, { recursive: true, force: true }) })

  it('is made once, kept for the owner’s eyes only, and differs from vault to vault', () => {
    const secret = sessionSecret(folder, undefined)
    expect(secret).toMatch(/^[\w-]{64}$/)
    expect(sessionSecret(folder, '')).toBe(secret)
    expect(readFileSync(join(folder, 'session-secret'), 'utf8')).toBe(secret)
    expect(statSync(join(folder, 'session-secret')).mode & 0o777).toBe(0o600)
    const other = mkdtempSync(join(tmpdir(), 'witnessmark-'))
    expect(sessionSecret(other, undefined)).not.toBe(secret)
    rmSync(other, { recursive: true })
  })

  it.each(['short', 'a'.repeat(64), 'abcabcabcabcabcabcabcabcabcabcabcabc'])('is refused when it is weak: %s', (secret) => {
    expect(codeOf(() => sessionSecret(folder, secret))).toBe('secret-weak')
    writeFileSync(join(folder, 'session-secret'), secret)
    expect(codeOf(() => sessionSecret(folder, undefined))).toBe('secret-weak')
  })

  it('is taken from the environment where that is strong', () => {
    expect(sessionSecret(folder, 'kQ7-vN2_xB9zLm4Tr8Wp1Yd6Hs3Jf5Gc0')).toBe('kQ7-vN2_xB9zLm4Tr8Wp1Yd6Hs3Jf5Gc0')
  })
})

describe('the public address', () => {
  it.each([[undefined, null], ['', null], ['https://marks.example/', 'https://marks.example'], ['http://10.0.0.4:3000/path', 'http://10.0.0.4:3000']])('%s has the origin %s', (url, origin) =>
    expect(publicOriginOf(url)).toBe(origin))
  it.each(['marks.example', 'ftp://marks.example', 'javascript:alert(1)'])('%s is none', url => expect(codeOf(() => publicOriginOf(url))).toBe('public-url'))
})

describe('the first start', () => {
  const logger = { info: vi.fn(), error: vi.fn() }
  afterEach(() => {
    vi.unstubAllEnvs()
    vi.clearAllMocks()
  })

  it('registers whom the environment names', async () => {
    const { vault, remove } = freshVault()
    vi.stubEnv('WITNESSMARK_ADMIN_EMAIL', 'ines@larkfield.example')
    vi.stubEnv('WITNESSMARK_ADMIN_PASSWORD', 'copper kettle under the stairs')
    await firstStart(vault, logger, null)
    expect((await signIn(vault, 'ines@larkfield.example', 'copper kettle under the stairs', '')).roles).toEqual(['admin'])
    await firstStart(vault, logger, null)
    expect(logger.info).toHaveBeenCalledTimes(1)
    remove()
  })

  it('prints the set-up address where nobody is named, or with too weak a password', async () => {
    const { vault, remove } = freshVault()
    await firstStart(vault, logger, 'https://marks.example')
    expect(logger.info).toHaveBeenLastCalledWith(expect.stringContaining(`https://marks.example/set-up?token=${setUpToken(vault)}`))
    vi.stubEnv('WITNESSMARK_ADMIN_EMAIL', 'ines@larkfield.example')
    vi.stubEnv('WITNESSMARK_ADMIN_PASSWORD', 'short')
    await firstStart(vault, logger, null)
    expect(logger.error).toHaveBeenCalledWith({ code: 'password-weak' }, expect.stringContaining('15 characters'))
    expect(logger.info).toHaveBeenLastCalledWith(expect.stringContaining('/set-up?token='))
    expect(isUnclaimed(vault)).toBe(true)
    remove()
  })
})
