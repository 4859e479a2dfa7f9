import { readFile } from 'node:fs/promises'
import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { TestServer } from '../support/server'
import { startServer } from '../support/server'
import { PHONE, Person, launchChromium, overhang } from './chromium'

const LEAD = 'lead@sallowmere.example'
const HAND = 'hand@sallowmere.example'

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

const bay = (on: Page, name: string) => on.getByRole('listitem').filter({ has: on.getByRole('link', { name: new RegExp(`${name}$`) }) })

async function open(person: Person, vessel: string, act?: string): Promise<void> {
  await person.goes('/cellar')
  await person.page.getByRole('link', { name: new RegExp(`${vessel}$`) }).click()
  await person.page.getByRole('heading', { level: 1, name: vessel }).waitFor()
  if (act === undefined) return
  await person.page.getByRole('navigation', { name: 'Acts' }).getByRole('link', { name: act, exact: true }).click()
  await person.page.getByRole('heading', { level: 1, name: `${act}: ${vessel}` }).waitFor()
}

const field = (on: Page, name: string) => on.getByLabel(name, { exact: true })
const keep = (on: Page) => on.getByRole('button', { name: /^Keep/ })

describe('the cellar', () => {
  it('says what is in each vessel, and how old it is', async () => {
    await lead.goes('/cellar')
    await page.getByText('13,388 litres in fourteen vessels, 2.05 years old on average.').waitFor()
    expect(await bay(page, 'Heron').innerText()).toMatch(/4,000\u00A0L, 2\.14\u00A0y\s+Called/)
    expect(await bay(page, 'Snipe Lower').innerText()).toContain('225\u00A0L, 6.81\u00A0y')
    expect(await bay(page, 'Teal One').innerText()).toMatch(/empty\s+Dry/)
    expect(await bay(page, 'Teal Two').innerText()).toContain('vinegar')
    expect(await page.getByRole('img', { name: 'Heron: vat of wood, room for 4,000 L, holding 4,000 L, 2.14 y. Fifteen brews, the oldest FB19-1 of 4 February 2019.' }).isVisible()).toBe(true)
    expect(await page.getByRole('figure').filter({ hasText: 'All beer by age' }).getByRole('listitem').allInnerTexts()).toEqual([
      '4,617\u00A0L\nunder 1 year, 34 %', '3,319\u00A0L\n1 to 2 years, 25 %', '2,543\u00A0L\n2 to 3 years, 19 %', '1,675\u00A0L\n3 to 5 years, 13 %', '1,234\u00A0L\n5 years and over, 9 %',
    ])
  })

  it('looks back to a day, keeps it in the address, and does not say how a vessel stood then', async () => {
    await lead.goes('/cellar')
    await field(page, 'As it was on').fill('2019-12-31')
    await lead.arrives('/cellar?on=2019-12-31')
    await page.getByText(/^31 December 2019: 4,657 litres|^31 December 2019:/).waitFor()
    await expect.poll(() => bay(page, 'Heron').innerText()).toContain('4,000\u00A0L')
    expect(await bay(page, 'Heron').innerText()).not.toContain('Called')
    await page.getByRole('button', { name: 'Today' }).click()
    await lead.arrives('/cellar')
  })
})

describe('draw and refill', () => {
  it('is one act by taps: the first takes the last value over, both lines are kept, and undo strikes both out', async () => {
    await open(lead, 'Moorhen', 'Draw and refill')
    await page.getByRole('button', { name: /^Out: \d+ more/ }).click()
    await page.getByRole('button', { name: /^In: \d+ more/ }).click()
    expect(await field(page, 'Out').inputValue()).toBe('375')
    await field(page, 'Brew that goes in').fill('SP26-2')
    expect(await field(page, 'Brewed on').inputValue()).toBe('2026-06-22')
    await page.getByText(/^Moorhen\. The mean falls by \d+\u00A0d to \d+\u00A0d\.$/).waitFor()
    await page.getByRole('button', { name: 'Keep 375 out, 375 in' }).click()
    await page.getByRole('status').filter({ hasText: 'Moorhen 375 out, 375 in, kept.' }).waitFor()
    const ledger = page.getByRole('region', { name: 'Ledger' })
    await ledger.getByRole('row', { name: /14 Sep 2026 Draw −375/ }).waitFor()
    await page.getByRole('button', { name: 'Undo' }).click()
    await page.getByText(/^Moorhen is as it was before/).waitFor()
    await expect.poll(() => ledger.getByText('by Sunniva Pell: undone at once').count()).toBe(2)
  })

  it('is done by a hand with the keyboard alone, who is told who can correct it', async () => {
    const hand = await Person.visiting(browser, server.origin, { as: HAND })
    await open(hand, 'Bittern', 'Draw and refill')
    const { keyboard } = hand.page
    await field(hand.page, 'Out').focus()
    await keyboard.type('10')
    for (let tabs = 0; tabs < 3; tabs++) await keyboard.press('Tab')
    expect(await field(hand.page, 'In').evaluate(input => input === document.activeElement)).toBe(true)
    await keyboard.type('10')
    for (let tabs = 0; tabs < 3; tabs++) await keyboard.press('Tab')
    await keyboard.type('MP26-1')
    await keyboard.press('Enter')
    await hand.page.getByText('Bittern: 10 out, 10 in, kept. The cellar lead, the head brewer or the owner can correct it.').waitFor()
    expect(await hand.page.getByRole('button', { name: /^Correct/ }).count()).toBe(0)
    await hand.leaves()
    expect(hand.complaints).toEqual([])
  })

  it('says at each field what is wrong, and keeps the rest', async () => {
    await open(lead, 'Heron', 'Draw and refill')
    await field(page, 'Out').fill('-5')
    await field(page, 'In').fill('1e30 or so')
    await field(page, 'Brew that goes in').fill('FB26-9')
    await field(page, 'Brewed on').fill('2026-09-20')
    await keep(page).click()
    await page.getByRole('alert').getByText(/fields need another look/).waitFor()
    for (const name of ['Out', 'In']) expect(await field(page, name).getAttribute('aria-invalid')).toBe('true')
    expect(await field(page, 'Out').evaluate(input => input === document.activeElement)).toBe(true)
    await field(page, 'Out').fill('5')
    await field(page, 'In').fill('5')
    await keep(page).click()
    await page.getByText('It cannot be racked before it was brewed.').waitFor()
    expect(await field(page, 'Brew that goes in').inputValue()).toBe('FB26-9')
  })

  it('warns of more than the book holds but does not bar it, and the vessel is marked until the line is struck out', async () => {
    await open(lead, 'Plover', 'Draw and refill')
    await field(page, 'Out').fill('900')
    await page.getByText(/^400\u00A0L more than is in Plover\./).waitFor()
    await keep(page).click()
    await page.getByRole('status').filter({ hasText: 'Plover 900 out, kept.' }).waitFor()
    await page.getByText('volume in doubt').waitFor()

    await page.getByRole('button', { name: /^Correct Draw of 14 September 2026/ }).click()
    const sheet = page.getByRole('dialog')
    await sheet.getByLabel('Why').fill('typed a nought too many')
    await sheet.getByRole('button', { name: 'Strike it out' }).click()
    await sheet.getByText('Struck out.').waitFor()
    expect(await sheet.getByRole('row').allInnerTexts()).toEqual(['Vessel\tBefore\tAfter', 'Plover\tempty\t500\u00A0L, 552\u00A0d'])
    await sheet.getByRole('button', { name: 'Back to the ledger' }).click()
    await page.getByText('by Sunniva Pell: typed a nought too many').waitFor()
    expect(await page.getByText('volume in doubt').count()).toBe(0)
  })

  it('keeps what is typed without a network and over a new load, and sends it once', async () => {
    await open(lead, 'Coot', 'Draw and refill')
    await field(page, 'Out').fill('12')
    await page.waitForLoadState('networkidle')
    await lead.context.setOffline(true)
    await keep(page).click()
    await page.getByText('No network. What you typed is kept here; try again.').waitFor()
    await lead.context.setOffline(false)
    await lead.goes(lead.path())
    expect(await field(page, 'Out').inputValue()).toBe('12')
    await page.route('**/api/acts', async (route) => {
      await route.fetch()
      await route.abort()
    }, { times: 1 })
    await keep(page).click()
    await page.getByText('No network. What you typed is kept here; try again.').waitFor()
    await keep(page).click()
    await page.getByRole('status').filter({ hasText: 'Coot 12 out, kept.' }).waitFor()
    const rows = page.getByRole('region', { name: 'Ledger' }).getByRole('row', { name: /14 Sep 2026 Draw −12/ })
    await rows.waitFor()
    expect(await rows.count()).toBe(1)
  })

  it('fits a narrow phone', async () => {
    const phone = await Person.visiting(browser, server.origin, { as: HAND, size: { ...PHONE, width: 320 } })
    await open(phone, 'Heron', 'Draw and refill')
    expect(await overhang(phone.page)).toBe(0)
    await phone.leaves()
  })
})

describe('a move', () => {
  it('shows what becomes of the beer that it goes to', async () => {
    await open(lead, 'Grebe', 'Move')
    await field(page, 'Out').fill('20')
    await field(page, 'Into').selectOption('Teal Two')
    await page.getByText(/^Teal Two\. The mean rises by/).waitFor()
    await page.getByText(/more than Teal Two holds/).waitFor()
  })
})

describe('what befell a vessel', () => {
  it('is recorded, and the vessel stands so', async () => {
    await open(lead, 'Dunlin')
    await page.getByRole('button', { name: 'Record what befell it' }).click()
    await page.getByRole('radio', { name: 'Set apart' }).check()
    await field(page, 'Why').fill('smells of cork')
    await page.getByRole('button', { name: 'Keep it' }).click()
    await page.getByText('Dunlin: set apart, 14 September 2026. Kept.').waitFor()
    await page.getByText('since 14 September 2026: smells of cork').waitFor()
  })
})

describe('the ledger as a file', () => {
  it('is tried first, names a bad line by its number and column, and is kept when it is good', async () => {
    const lines = Array.from({ length: 60 }, (_, index) => `2026-09-13;sample;Heron;0.1;;;${index}`)
    const file = (text: string[]) => ({ name: 'samples.csv', mimeType: 'text/csv', buffer: Buffer.from(['date;act;vessel;litres;target;brewed;note', ...text].join('\n')) })
    await lead.goes('/ledger')
    await page.getByLabel('Choose a file').setInputFiles(file(lines.map((line, index) => index === 55 ? line.replace('Heron', 'Hern') : line)))
    await page.getByRole('row', { name: '57 vessel No vessel here is named Hern.' }).waitFor()
    const button = page.getByRole('button', { name: 'Keep 60 lines' })
    expect(await button.getAttribute('aria-disabled')).toBe('true')
    await page.getByText('Keep waits for line 57').waitFor()
    await page.getByLabel('Another file').setInputFiles(file(lines))
    await page.getByRole('heading', { name: 'Every line is good' }).waitFor()
    await page.getByRole('button', { name: 'Keep 60 lines' }).click()
    await page.getByRole('heading', { name: 'Kept' }).waitFor()
    await page.getByText('samples.csv is kept: 60 lines.').waitFor()
  })

  it('is taken out, and comes back as it was', async () => {
    await lead.goes('/ledger')
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'Take out the ledger (CSV)' }).click()])
    const text = await readFile(await download.path(), 'utf8')
    expect(text.split('\n')[0]).toMatch(/date;act;vessel;litres/)
    await page.getByLabel('Choose a file').setInputFiles({ name: 'again.csv', mimeType: 'text/csv', buffer: Buffer.from(text) })
    await page.getByRole('heading', { name: 'Every line is good' }).waitFor()
  })

  it('tells that it could not be sent', async () => {
    await lead.goes('/ledger')
    await page.waitForLoadState('networkidle')
    await lead.context.setOffline(true)
    await page.getByLabel('Choose a file').setInputFiles({ name: 'a.csv', mimeType: 'text/csv', buffer: Buffer.from('date;act;vessel;litres\n') })
    await page.getByRole('alert').getByText(/There is no network/).waitFor()
    await lead.context.setOffline(false)
  })
})

describe('brews', () => {
  it('are found, and told which beer they are of', async () => {
    await lead.goes('/brews')
    await field(page, 'Code, beer or vessel').fill('bought')
    await page.getByRole('button', { name: 'Change BOUGHT-23' }).click()
    await page.getByRole('dialog').getByLabel('Beer').selectOption('Turf Dark')
    await page.getByRole('dialog').getByRole('button', { name: 'Keep the change' }).click()
    await page.getByRole('row', { name: /BOUGHT-23 Turf Dark/ }).waitFor()
    await page.getByRole('button', { name: 'Undo' }).click()
    await page.getByRole('row', { name: /BOUGHT-23 –/ }).waitFor()
  })
})
