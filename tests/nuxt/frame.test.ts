import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { FrameTop } from '#components'
import type { Me } from '#shared/api/people'
import { addressOf, safeBack } from '~/utils/addresses'
import { entries, entriesFor, isCurrent } from '~/utils/navigation'

const me: Me = { id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], sites: [], plant: 'Larkfield Preserves', empty: false, shared: false }
const every = new Set(entries.map(entry => entry.to))

describe('the entries of the rule', () => {
  it('are those of a person’s work, among the pages there are', () => {
    const words = (role: 'technician' | 'planner' | 'auditor' | 'admin') => entriesFor([role], every).map(entry => entry.word)
    expect(words('technician')).not.toContain('People')
    expect(words('auditor')).not.toContain('Upload')
    expect(words('admin')).toContain('People')
    expect(entriesFor(['admin'], new Set(['/'])).map(entry => entry.word)).toEqual(['Board'])
  })

  it('are current at and under their address, the board only at its own', () => {
    const entry = (to: string) => ({ to, word: '' })
    expect([isCurrent(entry('/units'), '/units'), isCurrent(entry('/units'), '/units/7'), isCurrent(entry('/units'), '/unitsx')]).toEqual([true, true, false])
    expect([isCurrent(entry('/'), '/'), isCurrent(entry('/'), '/units')]).toEqual([true, false])
  })

  it('leave at most four beside the menu of a phone', () => {
    expect(entries.filter(entry => entry.first).length).toBeLessThanOrEqual(4)
  })
})

describe('the rule', () => {
  it('marks the page one is on', async () => {
    const top = await mountSuspended(FrameTop, { props: { me, phone: false }, route: '/' })
    expect(top.findAll('[aria-current]').map(link => link.text())).toEqual(['Board'])
    expect(top.text()).toContain('Larkfield Preserves')
  })

  it('opens the menu of a phone and says so', async () => {
    const top = await mountSuspended(FrameTop, { props: { me, phone: true }, route: '/' })
    expect(top.get('.more button').attributes('aria-expanded')).toBe('true')
    const menu = top.get(`#${top.get('.more button').attributes('aria-controls')}`)
    expect(menu.findAll('input[type=radio]').map(choice => choice.attributes('value'))).toEqual(['system', 'light', 'dark'])
    expect(menu.text()).toContain('Sign out')
  })

  it('shows no entries to nobody', async () => {
    const top = await mountSuspended(FrameTop, { props: { phone: false }, route: '/' })
    expect(top.find('nav').exists()).toBe(false)
  })
})

describe('addresses', () => {
  it('keep a tag whole', () => {
    expect(addressOf.axis('LID-02.Z')).toBe('/axes/LID-02.Z')
    expect(addressOf.version('A/B', 3)).toBe('/axes/A%2FB/versions/3')
  })

  it('go back only within the application', () => {
    expect(['/axes/LID-02.Z?x=1', '//evil.example', '/\\evil.example', 'https://evil.example', '/sign-in?to=/', undefined, ['/a']].map(safeBack))
      .toEqual(['/axes/LID-02.Z?x=1', '/', '/', '/', '/', '/', '/'])
    expect([addressOf.signIn(), addressOf.signIn('/'), addressOf.signIn('/changes?a=1&b=2')]).toEqual(['/sign-in', '/sign-in', '/sign-in?to=%2Fchanges%3Fa%3D1%26b%3D2'])
  })
})
