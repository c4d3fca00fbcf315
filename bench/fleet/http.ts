import { mkdirSync } from 'node:fs'
import { BuiltServer } from '../built-server'
import { atMost, type Figure } from '../figure'
import { Chain, fileHead, fileText } from './chain'
import { historyQuestions, type Extent } from './history'
import { figuresOf, spread, timesOfAsync } from './times'

/*
 * The built server on the fleet, asked over HTTP by one client that keeps its connection: session, rights and the way there and
 * back are in the time.
 */

const askings = 100
const auditor = 'ines.morel@larkfield.example'

export async function measureHttp(folder: string, extent: Extent, tell: (figures: readonly Figure[]) => void): Promise<void> {
  mkdirSync(folder, { recursive: true })
  const server = new BuiltServer(folder)
  const begun = performance.now()
  await server.start()
  const started = performance.now() - begun
  try {
    const cookie = await server.signIn(auditor)
    const get = async (path: string) => {
      const answer = await fetch(server.origin + path, { headers: { cookie } })
      const text = await answer.text()
      if (answer.status !== 200) throw new Error(`${path} answered ${answer.status}: ${text.slice(0, 300)}`)
      return text
    }
    const asked = async (name: string, aim: number, path: (at: number) => string, times = askings) => { tell(figuresOf(`over HTTP: ${name}`, await timesOfAsync(times, at => get(path(at))), aim)) }
    tell([atMost('start of the server until it answers', started, 5000, 'ms')])
    for (const [name, question] of Object.entries(historyQuestions)) {
      await asked(`history, ${name}`, 20, at => `/api/history?${new URLSearchParams(Object.entries(question(at, extent)).map(([key, value]) => [key, String(value)])).toString()}`)
    }
    const axis = (at: number) => 1 + spread(at, extent.axes)
    const paths: Readonly<Record<string, readonly [aim: number, path: (at: number) => string]>> = {
      'board, whole': [20, () => '/api/board'],
      'axes, first page': [20, () => '/api/axes'],
      'axes of a machine': [20, at => `/api/axes?machineId=${1 + spread(at, extent.axes / 8)}`],
      'units, search': [20, at => `/api/units?search=LP-00${at % 90}`],
      'axis': [20, at => `/api/axes/${axis(at)}`],
      'versions of an axis': [20, at => `/api/axes/${axis(at)}/versions`],
      'life of an axis': [20, at => `/api/axes/${axis(at)}/life`],
      'neighbours of a machine': [50, at => `/api/machines/${1 + spread(at, extent.axes / 8)}/neighbours`],
      'one version': [20, at => `/api/versions/${1 + spread(at, extent.versions)}`],
      'findings, first page': [20, () => '/api/findings'],
      'findings that are open': [20, () => '/api/findings?state=open'],
      'findings of an axis': [20, at => `/api/findings?axis=${axis(at)}`],
      'axes not read in a week': [20, () => `/api/history/not-read?from=${new Date(extent.to - 7 * 86_400_000).toISOString()}`],
      'acts about places': [20, () => '/api/history/acts?kind=places'],
      'trail': [20, () => '/api/trail'],
      'checkpoint of now': [20, () => '/api/log/checkpoint'],
      'proof of an entry': [20, at => `/api/log/proof?entry=${spread(at, extent.versions)}`],
    }
    for (const [name, [aim, path]] of Object.entries(paths)) await asked(name, aim, path, name === 'board, whole' ? 20 : askings)
    tell(await uploads(server, await server.signIn('runa.haldersen@larkfield.example'), extent, get))
  }
  finally {
    server.stop()
  }
}

/** One after another, each at another axis; and what the first look at the board costs after each. */
async function uploads(server: BuiltServer, cookie: string, { axes }: Extent, get: (path: string) => Promise<string>): Promise<Figure[]> {
  const send = async (at: number) => {
    const chain = new Chain(at)
    chain.next()
    const body = fileHead(`LP-${String(spread(at, axes)).padStart(6, '0')}`, new Date().toISOString(), 9000) + fileText(chain.settings)
    const answer = await fetch(`${server.origin}/api/uploads`, { method: 'POST', headers: { cookie, 'content-type': 'application/json' }, body })
    const text = await answer.text()
    if (answer.status !== 201) throw new Error(`An upload answered ${answer.status}: ${text.slice(0, 300)}`)
  }
  const sent = await timesOfAsync(askings, send)
  const looked: number[] = []
  for (let at = 0; at < 10; at += 1) {
    await send(1000 + at)
    const begun = performance.now()
    await get('/api/board')
    looked.push(performance.now() - begun)
  }
  return [...figuresOf('over HTTP: an upload, stored, judged and compared', sent, 100), ...figuresOf('over HTTP: board, whole, first after an upload', looked, 20)]
}
