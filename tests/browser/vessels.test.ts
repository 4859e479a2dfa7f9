import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { DEMO_PASSWORD } from '../../dev/loadDemo'
import type { TestServer } from '../support/server'
import { startServer } from '../support/server'
import { Person, launchChromium } from './chromium'

const LEAD = 'lead@sallowmere.example'

let browser: Browser
let server: TestServer
let lead: Person
let page: Page

beforeAll(async () => {
  [browser, server] = await Promise.all([launchChromium(), startServer({ demo: true })])
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})
beforeEach(async () => {
  lead = await Person.visiting(browser, server.origin, { as: LEAD })
  page = lead.page
})
afterEach(async () => {
  await lead.leaves()
  expect(lead.complaints).toEqual([])
})

const keep = () => page.getByRole('button', { name: /^Keep/ })
const undo = () => page.getByRole('button', { name: 'Undo' })
const names = async () => (await page.getByRole('listitem').getByRole('heading', { level: 2 }).allInnerTexts()).map(text => text.replace(/^\d+\s+/, ''))

async function fillNew(name: string, litres: string): Promise<void> {
  await page.getByLabel('Name').fill(name)
  await page.getByRole('radio', { name: 'Steel tank' }).check()
  await page.getByLabel('Working litres').fill(litres)
}

async function change(name: string): Promise<void> {
  await lead.goes('/cellar')
  await page.getByRole('link', { name: new RegExp(`${name}$`) }).click()
  await page.getByRole('link', { name: `Change ${name}` }).click()
  await page.getByRole('heading', { name: `Change ${name}` }).waitFor()
}

describe('a vessel', () => {
  it('is set up, stands in the cellar, and is gone again by undo', async () => {
    await lead.goes('/cellar')
    await page.getByRole('link', { name: 'Set up a vessel' }).click()
    await lead.arrives('/vessels/new')
    await fillNew('Wigeon', '1500,5')
    expect(await page.getByRole('group', { name: 'Of wood' }).getByRole('radio', { name: 'No' }).isChecked()).toBe(true)
    await page.getByRole('button', { name: 'Keep Wigeon' }).click()
    await lead.arrives('/cellar')
    await page.getByRole('img', { name: 'Wigeon: steel tank of steel, room for 1,500.5 L, empty.' }).waitFor()
    expect(await page.getByRole('status').filter({ hasText: 'Wigeon stands in the cellar.' }).isVisible()).toBe(true)
    await undo().click()
    await page.getByText('Wigeon is gone from the cellar again.').waitFor()
    await expect.poll(names).not.toContain('Wigeon')
  })

  it('is changed, and is as before by undo', async () => {
    await change('Grebe')
    await page.getByLabel('Working litres').fill('1010')
    await keep().click()
    await lead.arrives('/cellar')
    await page.getByRole('img', { name: /^Grebe.*1,010 L/ }).waitFor()
    await undo().click()
    await page.getByText('Grebe is as it was before.').waitFor()
    await page.getByRole('img', { name: /^Grebe.*1,000 L/ }).waitFor()
  })

  it('is taken away, and put back by undo', async () => {
    await lead.goes('/vessels/new')
    await fillNew('Scaup', '225')
    await keep().click()
    await lead.arrives('/cellar')
    await change('Scaup')
    await page.getByRole('button', { name: 'Take this vessel away' }).click()
    await lead.arrives('/cellar')
    await expect.poll(names).not.toContain('Scaup')
    await undo().click()
    await page.getByText('Scaup stands in the cellar again.').waitFor()
    await expect.poll(names).toContain('Scaup')
  })

  it('shows the one who comes second what the first one set, and sets theirs on top of it', async () => {
    await change('Plover')
    await page.getByLabel('Name').fill('Golden Plover')
    const brewer = await Person.visiting(browser, server.origin, { as: 'brewer@sallowmere.example' })
    await brewer.goes(lead.path())
    await brewer.page.getByLabel('Working litres').fill('510')
    await brewer.page.getByRole('button', { name: 'Keep the change' }).click()
    await brewer.arrives('/cellar')
    await brewer.leaves()

    await keep().click()
    const sheet = page.getByRole('dialog', { name: 'Somebody changed this first.' })
    await sheet.waitFor()
    expect(await sheet.getByRole('row').allInnerTexts()).toEqual([
      'Field\tStands there now\tYou set', 'Name\tPlover\tGolden Plover', 'Working litres\t510\t510',
    ])
    // To close it is to put the question off: nothing that was typed is lost.
    await page.keyboard.press('Escape')
    expect(await page.getByLabel('Name').inputValue()).toBe('Golden Plover')
    await keep().click()
    await sheet.getByRole('button', { name: 'Set mine' }).click()
    await lead.arrives('/cellar')
    await page.getByRole('img', { name: /^Golden Plover.*510 L/ }).waitFor()
  })

  it('stays as the first one set it when the second keeps theirs', async () => {
    await change('Dunlin')
    await page.getByLabel('Working litres').fill('490')
    const tab = await lead.opensTab(lead.path())
    await tab.getByLabel('Working litres').fill('520')
    await tab.getByRole('button', { name: 'Keep the change' }).click()
    await tab.waitForURL('**/cellar')
    await keep().click()
    await page.getByRole('button', { name: 'Keep theirs' }).click()
    await lead.arrives('/cellar')
    await page.getByRole('img', { name: /^Dunlin.*520 L/ }).waitFor()
  })
})

describe('the form of a vessel', () => {
  it('says at the field what is wrong, and keeps the rest', async () => {
    await lead.goes('/vessels/new')
    await fillNew('', 'rather a lot')
    await keep().click()
    await page.getByRole('alert').getByText('2 fields need another look.').waitFor()
    const name = page.getByRole('textbox', { name: 'Name' })
    const litres = page.getByRole('textbox', { name: 'Working litres' })
    for (const field of [name, litres]) expect(await field.getAttribute('aria-invalid')).toBe('true')
    expect(await litres.evaluate(field => document.getElementById(field.getAttribute('aria-describedby')?.split(' ')[0] ?? '')?.textContent?.trim())).toMatch(/^Write a number in figures/)
    expect(await name.evaluate(field => field === document.activeElement)).toBe(true)
    expect(await litres.inputValue()).toBe('rather a lot')
    expect(await page.getByRole('radio', { name: 'Steel tank' }).isChecked()).toBe(true)
  })

  it('keeps what is typed without a network, says so, and sends it once when asked again', async () => {
    await lead.goes('/vessels/new')
    await fillNew('Shoveler', '800')
    await lead.context.setOffline(true)
    await page.getByText('No network since').waitFor()
    await keep().click()
    await page.getByText('No network. What you typed is kept here; try again.').waitFor()
    expect(await page.getByLabel('Name').inputValue()).toBe('Shoveler')
    await lead.context.setOffline(false)
    await page.getByText('No network since').waitFor({ state: 'hidden' })
    await keep().click()
    await lead.arrives('/cellar')
    await expect.poll(async () => (await names()).filter(name => name === 'Shoveler')).toEqual(['Shoveler'])
  })

  it('does not keep twice what arrived though its answer was lost', async () => {
    await lead.goes('/vessels/new')
    await fillNew('Pintail', '700')
    await page.route('**/api/vessels', async (route) => {
      await route.fetch()
      await route.abort()
    }, { times: 1 })
    await keep().click()
    await page.getByText('No network. What you typed is kept here; try again.').waitFor()
    await keep().click()
    await lead.arrives('/cellar')
    await expect.poll(async () => (await names()).filter(name => name === 'Pintail')).toEqual(['Pintail'])
  })

  it('is there again after the page is loaded anew, and after one had to sign in again', async () => {
    await lead.goes('/vessels/new')
    await fillNew('Garganey', '650')
    await lead.goes('/vessels/new')
    expect(await page.getByLabel('Name').inputValue()).toBe('Garganey')

    await lead.context.clearCookies()
    await keep().click()
    await lead.arrives('/sign-in?next=/vessels/new')
    await page.getByLabel('E-mail').fill(LEAD)
    await page.getByLabel('Password').fill(DEMO_PASSWORD)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await lead.arrives('/vessels/new')
    expect(await page.getByLabel('Name').inputValue()).toBe('Garganey')
    expect(await page.getByLabel('Working litres').inputValue()).toBe('650')
    expect(await page.getByRole('radio', { name: 'Steel tank' }).isChecked()).toBe(true)
  })

  it('can be filled in and undone by keyboard alone', async () => {
    await lead.goes('/vessels/new')
    const { keyboard } = page
    await page.getByLabel('Name').focus()
    await keyboard.type('Smew')
    await keyboard.press('Tab')
    await keyboard.press('ArrowRight')
    await keyboard.press('ArrowRight')
    expect(await page.getByRole('radio', { name: 'Barrel' }).isChecked()).toBe(true)
    await keyboard.press('Tab')
    await keyboard.type('225')
    await keyboard.press('Enter')
    await lead.arrives('/cellar')
    await page.getByRole('img', { name: /^Smew: barrel of wood/ }).waitFor()
    await keyboard.press('Shift+Tab')
    expect(await undo().evaluate(button => button === document.activeElement)).toBe(true)
    // The clock stands while one is on it.
    const shown = await undo().innerText()
    await page.waitForTimeout(2500)
    expect(await undo().innerText()).toBe(shown)
    await keyboard.press('Enter')
    await page.getByText('Smew is gone from the cellar again.').waitFor()
  })
})

describe('the cellar', () => {
  it('says that it could not be read, and reads it when asked again', async () => {
    await lead.goes('/you')
    await page.route('**/api/vessels?*', route => route.fulfill({ status: 500, body: 'out of order' }))
    await page.getByRole('link', { name: 'Cellar', exact: true }).click()
    await page.getByRole('alert').getByText('The cellar could not be read.').waitFor()
    await page.unroute('**/api/vessels?*')
    await page.getByRole('button', { name: 'Try now' }).click()
    await page.getByRole('img', { name: /^Heron/ }).waitFor()
  })

  it('says so when the way on leads through a network that is not there', async () => {
    await lead.goes('/cellar')
    await page.getByRole('link', { name: /Heron$/ }).click()
    await page.getByRole('heading', { level: 1, name: 'Heron' }).waitFor()
    await page.waitForLoadState('networkidle')
    await lead.context.setOffline(true)
    await page.getByRole('link', { name: 'Change Heron' }).click()
    await page.getByRole('alert').getByText('The vessel could not be read. There is no network.').waitFor()
    await lead.context.setOffline(false)
    await page.getByRole('button', { name: 'Try now' }).click()
    await page.getByRole('heading', { name: 'Change Heron' }).waitFor()
  })

  it('shows nothing while it is read quickly, and a filling bar when it takes longer', async () => {
    await lead.goes('/you')
    await page.route('**/api/vessels?*', async (route) => {
      await new Promise(resolve => setTimeout(resolve, 1500))
      await route.continue()
    })
    await page.getByRole('link', { name: 'Cellar', exact: true }).click()
    await page.getByRole('status').getByText('Reading what stands in the cellar').waitFor()
    await page.getByRole('img', { name: /^Heron/ }).waitFor()
  })

  it('tells the same in a table', async () => {
    await lead.goes('/cellar')
    await page.getByRole('button', { name: 'The same as a table' }).click()
    const rows = await page.getByRole('table', { name: 'The vessels of the cellar in walking order' }).getByRole('row').allInnerTexts()
    expect(rows[0]).toBe('Vessel\tKind\tStanding\tHolds\tRoom\tA tenth is younger than\tA tenth is older than\tLook at')
    expect(rows[1]?.split('\t').map(text => text.trim())).toEqual(['1 Heron', 'Vat', 'Called', '4,000\u00A0L, 2.14\u00A0y', '4,000\u00A0L', '210\u00A0d', '1,771\u00A0d', ''])
  })

  it('is black on white on paper, without anything to press', async () => {
    await lead.goes('/cellar')
    await page.emulateMedia({ media: 'print' })
    expect(await page.evaluate(() => getComputedStyle(document.body).backgroundColor)).toBe('rgb(255, 255, 255)')
    expect(await page.getByRole('link', { name: /^Change|Set up a vessel/ }).filter({ visible: true }).count()).toBe(0)
    expect(await page.getByRole('button').filter({ visible: true }).count()).toBe(0)
    expect(await page.getByRole('heading', { name: '1 Heron' }).isVisible()).toBe(true)
  })
})
