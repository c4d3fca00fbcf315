import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { readBody, setResponseStatus } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { LettersWatchButton } from '#components'
import type { Letter, OwnLetters } from '#shared/api/letters'
import LettersPage from '~/pages/letters.vue'
import MePage from '~/pages/me.vue'

const letter: Letter = {
  id: 3, kind: 'swap-released', to: { id: 3, name: 'Ines Okafor', email: 'ines@larkfield.example' }, title: 'LID-02.Z: swap released', path: '/swaps/7', state: 'failed',
  madeAt: '2026-12-01T06:00:00.000Z', attempts: 1, nextTryAt: null, settledAt: '2026-12-01T06:01:00.000Z', problem: 'no such mailbox',
}
const queue = { waiting: 0, waitingSince: null, way: 'folder', publicUrl: false }
let own: OwnLetters
let bodies: unknown[] = []
let refuse = false

registerEndpoint('/api/letters', () => ({ items: [letter], next: null, queue }))
registerEndpoint('/api/letters/3', () => ({ ...letter, messageId: 'abc@witnessmark', text: 'Runa released the swap.\n' }))
registerEndpoint('/api/letters/3/send-again', { method: 'POST', handler: (event) => {
  setResponseStatus(event, 409)
  return { type: 'about:blank', title: 'Being sent', status: 409, code: 'letter-under-way', detail: 'The letter is being sent just now.' }
} })
registerEndpoint('/api/me/letters', { method: 'GET', handler: () => own })
for (const path of ['/api/me/letters', '/api/me/watches']) {
  registerEndpoint(path, { method: 'POST', handler: async (event) => {
    const body = await readBody<{ scope: 'axis', scopeId: number, watched: boolean }>(event)
    bodies.push(body)
    if (refuse) {
      setResponseStatus(event, 404)
      return { type: 'about:blank', title: 'Not there', status: 404, code: 'not-found', detail: 'There is no axis 7.' }
    }
    own = body.scope ? { ...own, watches: body.watched ? [...own.watches, { scope: body.scope, scopeId: body.scopeId, name: 'LID-02.Z' }] : [] } : own
    return own
  } })
}
const reads = async (mounted: VueWrapper, words: string) => vi.waitFor(() => expect(mounted.text().replace(/\s+/g, ' ')).toContain(words))
const pressed = async (mounted: VueWrapper, words: string) => {
  const found = mounted.findAll('button').find(button => button.text().includes(words))
  if (!found) throw new Error(`no button ${words}`)
  await found.trigger('click')
  await flushPromises()
}

beforeEach(() => {
  bodies = []
  refuse = false
  own = { choices: [{ kind: 'swap-released', says: 'A swapped unit was released.', reach: 'watchers', wanted: true }, { kind: 'checkpoint', says: 'Once a day: the checkpoint.', reach: 'vault', wanted: true }], watches: [] }
  useSession().begin({ id: 3, name: 'Ines Okafor', email: 'ines@larkfield.example', roles: ['admin'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Copenhagen' }], plant: 'Larkfield Preserves', empty: false, shared: false })
})

describe('the letters page', () => {
  it('says where letters go, what waits, and why one failed', async () => {
    const page = await mountSuspended(LettersPage)
    await reads(page, 'No letter waits')
    await reads(page, 'SMTP_URL is not set')
    await reads(page, 'PUBLIC_URL is not set.')
    await reads(page, 'LID-02.Z: swap released')
    await pressed(page, 'read')
    await reads(page, 'Runa released the swap.')
    await reads(page, 'no such mailbox')
    await reads(page, 'abc@witnessmark')
  })

  it('says why a letter cannot be sent again just now', async () => {
    const page = await mountSuspended(LettersPage)
    await reads(page, 'LID-02.Z: swap released')
    await pressed(page, 'send again')
    await reads(page, 'The letter is being sent just now.')
  })

  it('is for administrators', async () => {
    useSession().begin({ id: 1, name: 'Runa', email: 'r@larkfield.example', roles: ['planner'], sites: [], plant: '', empty: false, shared: false })
    const page = await mountSuspended(LettersPage)
    expect(page.text()).toContain('Letters are kept by administrators.')
    expect(page.find('table').exists()).toBe(false)
  })
})

describe('my letters', () => {
  it('keep each tick at once', async () => {
    const page = await mountSuspended(MePage)
    await reads(page, 'A swapped unit was released.')
    await reads(page, 'You watch nothing yet')
    const box = (words: string) => page.get(`[id="${page.findAll('label').find(label => label.text() === words)?.attributes('for')}"]`)
    await box('Once a day: the checkpoint.').setValue(false)
    await box('Larkfield: every axis').setValue(true)
    await vi.waitFor(() => expect(bodies).toHaveLength(2))
    expect(bodies).toEqual([{ kind: 'checkpoint', wanted: false }, { scope: 'site', scopeId: 1, watched: true }])
  })
})

describe('the button to watch', () => {
  const mounted = (wider: { scope: 'machine', scopeId: number }[] = []) => mountSuspended(LettersWatchButton, { props: { scope: 'axis', scopeId: 7, wider } })

  it('watches, and says so', async () => {
    const button = await mounted()
    await vi.waitFor(() => expect(button.get('button').attributes('disabled')).toBeUndefined())
    await pressed(button, 'Watch')
    await reads(button, 'Watched')
    expect(bodies).toEqual([{ scope: 'axis', scopeId: 7, watched: true }])
    expect(button.get('button').attributes('aria-pressed')).toBe('true')
  })

  it('leads to the choice where a wider place is watched', async () => {
    own = { ...own, watches: [{ scope: 'machine', scopeId: 2, name: 'LID-02' }] }
    const button = await mounted([{ scope: 'machine', scopeId: 2 }])
    await reads(button, 'Watched with LID-02')
    expect(button.get('a').attributes('href')).toBe('/me')
  })

  it('says what went wrong', async () => {
    refuse = true
    const button = await mounted()
    await vi.waitFor(() => expect(button.get('button').attributes('disabled')).toBeUndefined())
    await pressed(button, 'Watch')
    await reads(button, 'Not there')
  })
})
