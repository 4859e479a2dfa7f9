import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { TestServer } from '../support/server'
import { startServer } from '../support/server'
import { Person, SIZES, THEMES, launchChromium, overhang, tooSmall, violations } from './chromium'

const LEAD = 'lead@sallowmere.example'

let browser: Browser
let demo: TestServer
let empty: TestServer

beforeAll(async () => {
  [browser, demo, empty] = await Promise.all([launchChromium(), startServer({ demo: true }), startServer({ demo: false })])
  // One of the demo's hands is in two breweries, so that the page that asks which is seen too; the other brewery has no vessels.
  await demo.db.asSuperuser(`insert into memberships (brewery_id, user_id, role)
    select b.id, u.id, 'cellarLead' from breweries b, users u where b.name = 'Quernhollow' and u.email = 'hand@sallowmere.example'`)
  // A ledger is never taken away; here alone, as if it had never been.
  const emptied = ['reversals', 'movements', 'ledger_notes', 'vessel_events', 'vessels'].map(table => `delete from ${table} where brewery_id = (select id from breweries where name = 'Quernhollow')`)
  await demo.db.asSuperuser(['begin', 'set local session_replication_role = replica', ...emptied, 'commit'].join(';'))
})
afterAll(async () => {
  await browser.close()
  await Promise.all([demo.stop(), empty.stop()])
})

interface State {
  as?: string
  at: string
  /** On the installation that waits for its set-up. */
  empty?: boolean
  then?: (person: Person) => Promise<unknown>
}

const press = (name: string | RegExp) => ({ page }: Person) => page.getByRole('button', { name }).click()

/** Every page in every state in which it can be found. */
const STATES: Record<string, State> = {
  'sign-in': { at: '/sign-in' },
  'sign-in, wrongly filled': { at: '/sign-in', then: person => press('Sign in')(person).then(() => person.page.getByText('2 fields need another look.').waitFor()) },
  'sign-in of an empty installation': { at: '/sign-in', empty: true },
  'set-up': { at: '/set-up', empty: true },
  'set-up, wrongly filled': { at: '/set-up', empty: true, then: person => press(/^Set up/)(person).then(() => person.page.getByText(/fields need another look/).waitFor()) },
  'set-up that is over': { at: '/set-up' },
  'which brewery': { as: 'hand@sallowmere.example', at: '/breweries' },
  'cellar': { as: LEAD, at: '/cellar' },
  'cellar, as a table': { as: LEAD, at: '/cellar', then: press('The same as a table') },
  'cellar, to read only': { as: 'auditor@sallowmere.example', at: '/cellar' },
  'cellar without vessels': {
    as: 'hand@sallowmere.example',
    at: '/breweries',
    then: person => press(/^Quernhollow/)(person).then(() => person.page.getByText('No vessel stands here yet.').waitFor()),
  },
  'cellar that could not be read': {
    as: LEAD,
    at: '/you',
    async then({ page }) {
      await page.route('**/api/vessels?*', route => route.abort())
      await page.getByRole('link', { name: 'Cellar', exact: true }).click()
      await page.getByText('The cellar could not be read.').waitFor()
    },
  },
  'cellar while it is read': {
    as: LEAD,
    at: '/you',
    async then({ page }) {
      await page.route('**/api/vessels?*', () => {})
      await page.getByRole('link', { name: 'Cellar', exact: true }).click()
      await page.getByText('Reading what stands in the cellar').waitFor()
    },
  },
  'without a network': { as: LEAD, at: '/cellar', then: loseNetwork },
  'a new vessel': { as: LEAD, at: '/vessels/new' },
  'a new vessel, wrongly filled': { as: LEAD, at: '/vessels/new', then: person => press(/^Keep/)(person).then(() => person.page.getByText('2 fields need another look.').waitFor()) },
  'a vessel to change': { as: LEAD, at: '/cellar', then: changeHeron },
  'a vessel that was changed, to be undone': {
    as: LEAD,
    at: '/cellar',
    async then(person) {
      await changeHeron(person)
      await person.page.getByLabel('Working litres').fill(String(4000 + Math.floor(performance.now() % 1000)))
      await press('Keep the change')(person)
      await person.page.getByRole('button', { name: 'Undo' }).hover()
    },
  },
  'a vessel that somebody changed first': {
    as: LEAD,
    at: '/cellar',
    async then(person) {
      await changeHeron(person)
      await person.page.route('**/api/vessels/*', async (route) => {
        const [current] = await (await route.fetch({ url: `${demo.origin}/api/vessels`, method: 'GET', postData: '' })).json()
        const problem = { type: 'about:blank', title: 'Stale', status: 409, detail: 'Somebody changed this first.', code: 'stale', errors: [], current: { ...current, workingLitres: 4200, version: 99 } }
        await route.fulfill({ status: 409, contentType: 'application/problem+json', json: problem })
      })
      await person.page.getByLabel('Working litres').fill('4100')
      await press('Keep the change')(person)
      await person.page.getByRole('dialog').waitFor()
    },
  },
  'cellar, looking back': { as: LEAD, at: '/cellar?on=2022-05-03' },
  'a vessel’s page': { as: LEAD, at: '/cellar', then: openHeron },
  'a vessel’s page, to read only': { as: 'auditor@sallowmere.example', at: '/cellar', then: openHeron },
  'a vessel’s page, with its reckonings told': {
    as: LEAD,
    at: '/cellar',
    async then(person) {
      await openHeron(person)
      for (const how of await person.page.getByText('how', { exact: true }).all()) await how.click()
      await press('Record what befell it')(person)
      await press('All lines')(person)
    },
  },
  'a line to be struck out': {
    as: LEAD,
    at: '/cellar',
    async then(person) {
      await openHeron(person)
      await person.page.getByRole('button', { name: /^Correct Draw of 23 March 2026/ }).click()
      await press('Strike it out')(person)
      await person.page.getByText('One field needs another look.').waitFor()
    },
  },
  'draw and refill': { as: 'packaging@sallowmere.example', at: '/cellar', then: person => openAct(person, 'Draw and refill') },
  'draw and refill, of more than there is, wrongly filled': {
    as: LEAD,
    at: '/cellar',
    async then(person) {
      await openAct(person, 'Draw and refill')
      await person.page.getByLabel('Out', { exact: true }).fill('10000')
      await person.page.getByLabel('In', { exact: true }).fill('rather a lot')
      await press(/^Keep/)(person)
      await person.page.getByText(/fields need another look/).waitFor()
    },
  },
  'fill': { as: LEAD, at: '/cellar', then: person => openAct(person, 'Fill') },
  'move': {
    as: LEAD,
    at: '/cellar',
    async then(person) {
      await openAct(person, 'Move')
      await person.page.getByLabel('Out', { exact: true }).fill('100')
      await person.page.getByLabel('Into', { exact: true }).selectOption('Grebe')
      await person.page.getByRole('region', { name: 'Grebe before and after' }).waitFor()
    },
  },
  'loss': { as: LEAD, at: '/cellar', then: person => openAct(person, 'Loss') },
  'brews': { as: LEAD, at: '/brews' },
  'a brew to change': { as: LEAD, at: '/brews', then: press('Change FB26-1') },
  'ledger': { as: LEAD, at: '/ledger' },
  'ledger, to take out only': { as: 'auditor@sallowmere.example', at: '/ledger' },
  'ledger, with a bad line': {
    as: LEAD,
    at: '/ledger',
    async then({ page }) {
      await page.getByLabel('Choose a file').setInputFiles({ name: 'bad.csv', mimeType: 'text/csv', buffer: Buffer.from('date;act;vessel;litres\n2026-18-08;draw;Heron;5\n') })
      await page.getByRole('heading', { name: 'Lines to put right' }).waitFor()
    },
  },
  'your own page': { as: LEAD, at: '/you' },
  'a taster’s own page': { as: 'taster@sallowmere.example', at: '/you' },
  'a page that is not there': { as: LEAD, at: '/nowhere' },
  'a page for other roles': { as: 'taster@sallowmere.example', at: '/cellar' },
}

async function loseNetwork({ context, page }: Person): Promise<void> {
  await page.waitForLoadState('networkidle')
  await context.setOffline(true)
  await page.getByText('No network since').waitFor()
}

async function openHeron({ page }: Person): Promise<void> {
  await page.getByRole('link', { name: /Heron$/ }).click()
  await page.getByRole('heading', { level: 1, name: 'Heron' }).waitFor()
}

async function openAct(person: Person, name: string): Promise<void> {
  await openHeron(person)
  await person.page.getByRole('navigation', { name: 'Acts' }).getByRole('link', { name, exact: true }).click()
  await person.page.getByRole('heading', { level: 1, name: `${name}: Heron` }).waitFor()
}

async function changeHeron({ page }: Person): Promise<void> {
  await page.getByRole('link', { name: /Heron$/ }).click()
  await page.getByRole('link', { name: 'Change Heron' }).click()
  await page.getByLabel('Working litres').waitFor()
}

/** What is wrong with a page at each size and in each theme: for people who see, hear, point or tab. */
async function faults(page: Page): Promise<string[]> {
  const found: string[] = []
  for (const [name, size] of Object.entries(SIZES)) {
    await page.setViewportSize(size)
    const wide = await overhang(page)
    const said = [...wide > 0 ? [`${wide} px too wide`] : [], ...await tooSmall(page)]
    for (const theme of THEMES) {
      await page.emulateMedia({ colorScheme: theme === 'day' ? 'light' : 'dark' })
      said.push(...(await violations(page)).map(violation => `${theme}: ${violation}`))
    }
    found.push(...said.map(fault => `${name}: ${fault}`))
  }
  await page.setViewportSize({ width: 320, height: 640 })
  const wide = await overhang(page)
  return wide > 0 ? [...found, `at 320 px: ${wide} px too wide`] : found
}

describe('every page in every state, by day and by night, on desk, tablet and phone', () => {
  it.each(Object.entries(STATES))('%s', async (_, { as, at, empty: waiting = false, then }) => {
    const person = await Person.visiting(browser, waiting ? empty.origin : demo.origin, { as })
    await person.goes(at)
    await then?.(person)
    expect(await faults(person.page)).toEqual([])
    expect(person.complaints).toEqual([])
    await person.leaves()
  })
})

describe('the walls', () => {
  it('are of the colour that was chosen, before any script has run', async () => {
    const person = await Person.visiting(browser, demo.origin, { as: LEAD })
    await person.goes('/you')
    await person.page.getByText('Night', { exact: true }).click()
    const walls = () => person.page.evaluate(() => getComputedStyle(document.body).backgroundColor)
    await expect.poll(walls).toBe('rgb(21, 18, 15)')
    const served = await person.page.request.get(`${demo.origin}/cellar`)
    expect(await served.text()).toMatch(/<html[^>]* class="night"/)
    await person.page.getByText('As the device', { exact: true }).click()
    await expect.poll(walls).toBe('rgb(247, 244, 236)')
    await person.leaves()
  })

  it('stay where they are while the cellar loads', async () => {
    const person = await Person.visiting(browser, demo.origin, { as: LEAD })
    await person.context.addInitScript(() => {
      Reflect.set(window, 'shifts', 0)
      new PerformanceObserver((list) => {
        for (const entry of list.getEntries()) Reflect.set(window, 'shifts', Number(Reflect.get(window, 'shifts')) + Number(Reflect.get(entry, 'value')))
      }).observe({ type: 'layout-shift', buffered: true })
    })
    await person.goes('/cellar')
    await person.page.waitForTimeout(500)
    expect(await person.page.evaluate(() => Reflect.get(window, 'shifts'))).toBe(0)
    await person.leaves()
  })
})
