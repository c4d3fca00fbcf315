import { readFileSync, mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { chromium } from 'playwright-core'
import { needChromium } from './chromium.mjs'

/*
 * `npm run pictures`, while `npm run demo` serves: the pictures of the README, taken from the real screens.
 */

const origin = process.env.ORIGIN ?? 'http://localhost:3000'
const folder = join('docs', 'pictures')
const { people } = JSON.parse(readFileSync(join('fixtures', 'larkfield', 'plant.json'), 'utf8'))
const planner = people.find(person => person.key === 'planner')
const shots = [
  { name: 'board', path: '/', width: 1440, height: 1000, scheme: 'light' },
  { name: 'changes', path: '/changes?a=LID-03.Z/4&b=LID-03.Z/5', width: 1440, height: 1360, scheme: 'light' },
  { name: 'axis-night', path: '/axes/LID-03.Z', width: 1440, height: 1300, scheme: 'dark' },
  { name: 'axis-phone', path: '/axes/LID-03.Z', width: 390, height: 844, scheme: 'light' },
]

mkdirSync(folder, { recursive: true })
const browser = await chromium.launch({ executablePath: needChromium(), args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking'] })
for (const { name, path, width, height, scheme } of shots) {
  const context = await browser.newContext({ baseURL: origin, viewport: { width, height }, colorScheme: scheme, reducedMotion: 'reduce', timezoneId: 'Europe/Berlin', locale: 'en-GB' })
  const page = await context.newPage()
  const signedIn = await context.request.post('/api/sign-in', { data: { email: planner.email, password: planner.password } })
  if (!signedIn.ok()) throw new Error(`sign-in answered ${signedIn.status()}: is the demo served at ${origin}?`)
  await page.goto(path)
  await page.getByRole('heading', { level: 1 }).waitFor()
  await page.waitForLoadState('networkidle')
  await page.screenshot({ path: join(folder, `${name}.png`) })
  console.log(join(folder, `${name}.png`))
  await context.close()
}
await browser.close()
