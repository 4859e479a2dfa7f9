import type { Browser } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { DEMO_PASSWORD } from '../../dev/loadDemo'
import type { TestServer } from '../support/server'
import { startServer } from '../support/server'
import { Person, launchChromium } from './chromium'

let browser: Browser
const people: Person[] = []

async function visit(...[origin, options]: [string, Parameters<typeof Person.visiting>[2]?]): Promise<Person> {
  const person = await Person.visiting(browser, origin, options)
  people.push(person)
  return person
}

async function signIn({ page }: Person, email: string, password = DEMO_PASSWORD): Promise<void> {
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
}

beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(() => browser.close())
afterEach(async () => {
  const complaints = people.flatMap(person => person.complaints)
  await Promise.all(people.splice(0).map(person => person.leaves()))
  expect(complaints).toEqual([])
})

describe('an empty installation', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startServer({ demo: false })
  })
  afterAll(() => server.stop())

  it('is set up with the code that was printed, and its owner begins in an empty cellar', async () => {
    const owner = await visit(server.origin)
    const { page } = owner
    await owner.goes('/')
    expect(owner.path()).toBe('/set-up')
    await expect.poll(() => page.getByLabel('Time zone').inputValue()).toBe('Europe/Copenhagen')
    expect(await page.getByText('Found on this device').isVisible()).toBe(true)

    await page.getByLabel('One-time code').fill('WRNG WRNG WRNG')
    await page.getByLabel('Brewery').fill('Sedge & Sons')
    await page.getByLabel('Your name').fill('Ida Sedge')
    await page.getByLabel('E-mail').fill('ida@sedge.example')
    await page.getByLabel('Password').fill('short')
    await page.getByRole('button', { name: 'Set up and sign in' }).click()
    await page.getByText('Use 10 signs or more').waitFor()
    expect(await page.getByLabel('Brewery').inputValue()).toBe('Sedge & Sons')

    await page.getByLabel('Password').fill('a few plain words')
    await page.getByRole('button', { name: 'Set up and sign in' }).click()
    await page.getByRole('alert').getByText(/\w/).first().waitFor()
    expect(owner.path()).toBe('/set-up')

    // In any case, with or without its spaces.
    await page.getByLabel('One-time code').fill(server.setUpCode?.toLowerCase().replaceAll(' ', '') ?? '')
    expect(await page.getByText('12 of 12 signs').isVisible()).toBe(true)
    await page.getByRole('button', { name: 'Set up and sign in' }).click()
    await owner.arrives('/cellar')
    await page.getByRole('heading', { name: 'No vessel stands here yet.' }).waitFor()
    expect(await page.getByRole('link', { name: /Ida Sedge, owner/ }).isVisible()).toBe(true)
  })

  it('says so when it is set up already, and leads to the sign-in', async () => {
    const late = await visit(server.origin)
    await late.goes('/set-up')
    await late.page.getByText('This cellar is set up.').waitFor()
    await late.page.getByRole('link', { name: 'To the sign-in' }).click()
    await late.arrives('/sign-in')
    expect(await late.page.getByRole('link', { name: 'Set it up' }).count()).toBe(0)
  })
})

describe('the door', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startServer({ demo: true })
  })
  afterAll(() => server.stop())

  it.each([
    ['owner@sallowmere.example', 'Odile Varnham, owner', true],
    ['brewer@sallowmere.example', 'Bram Ketteridge, head brewer', true],
    ['lead@sallowmere.example', 'Sunniva Pell, cellar lead', true],
    ['hand@sallowmere.example', 'Jory Athellow, cellar hand', false],
    ['packaging@sallowmere.example', 'Keziah Holmstead, packager', false],
    ['auditor@sallowmere.example', 'R. Ostrander, auditor, read only', false],
  ])('lets %s into the cellar', async (email, folio, editor) => {
    const person = await visit(server.origin)
    const { page } = person
    await person.goes('/')
    expect(person.path()).toBe('/sign-in')
    await signIn(person, email)
    await person.arrives('/cellar')
    await page.getByText('13,388 litres in fourteen vessels, 2.05 years old on average. One is empty.').waitFor()
    expect(await page.getByRole('banner').getByRole('link', { name: folio }).innerText()).toContain('Mon 14 September 2026, week 38')
    expect(await page.getByRole('navigation', { name: 'Screens' }).getByRole('link').allInnerTexts()).toEqual(editor || email.startsWith('auditor') ? ['Cellar', 'Brews', 'Ledger'] : ['Cellar', 'Brews'])
    expect(await page.getByRole('img', { name: /room for/ }).count()).toBe(14)
    expect(await page.getByRole('link', { name: 'Set up a vessel' }).count()).toBe(editor ? 1 : 0)
  })

  it('takes a taster to their own page, for the cellar is not theirs', async () => {
    const taster = await visit(server.origin)
    await taster.goes('/')
    await signIn(taster, 'taster@sallowmere.example')
    await taster.arrives('/you')
    await taster.page.getByText('Taster at Sallowmere Brewing. The duties that are yours will stand here.').waitFor()
    expect(await taster.page.getByRole('navigation', { name: 'Screens' }).count()).toBe(0)
    await taster.goes('/cellar')
    await taster.page.getByRole('heading', { name: 'Not for your role' }).waitFor()
    await taster.page.getByRole('button', { name: 'Back to the beginning' }).click()
    await taster.arrives('/you')
  })

  it('refuses a wrong password in one sentence, and keeps the address', async () => {
    const person = await visit(server.origin)
    await person.goes('/sign-in')
    await signIn(person, 'owner@sallowmere.example', 'not the password')
    await person.page.getByText('The address or the password is not right.').waitFor()
    expect(await person.page.getByLabel('E-mail').inputValue()).toBe('owner@sallowmere.example')
    expect(person.path()).toBe('/sign-in')
  })

  it('leads on to where one was going, but never to another house', async () => {
    const person = await visit(server.origin)
    await person.goes('/vessels/new')
    expect(person.path()).toBe('/sign-in?next=/vessels/new')
    await signIn(person, 'lead@sallowmere.example')
    await person.arrives('/vessels/new')

    for (const next of ['//example.com', '/\\example.com', 'https://example.com', '/%09/example.com']) {
      const stranger = await visit(server.origin)
      await stranger.goes(`/sign-in?next=${encodeURIComponent(next)}`)
      await signIn(stranger, 'lead@sallowmere.example')
      await stranger.arrives('/cellar')
    }
  })

  it('is left by one device, or by all of them', async () => {
    const desk = await visit(server.origin)
    await desk.goes('/sign-in')
    await signIn(desk, 'packaging@sallowmere.example')
    await desk.arrives('/cellar')
    const phone = await visit(server.origin)
    await phone.goes('/sign-in')
    await signIn(phone, 'packaging@sallowmere.example')
    await phone.arrives('/cellar')

    await phone.page.getByRole('link', { name: /Keziah Holmstead/ }).click()
    await phone.page.getByRole('button', { name: 'Sign out', exact: true }).click()
    await phone.arrives('/sign-in')
    await desk.goes('/you')
    expect(desk.path()).toBe('/you')

    await phone.goes('/sign-in')
    await signIn(phone, 'packaging@sallowmere.example')
    await phone.arrives('/cellar')
    await desk.page.getByRole('button', { name: 'Sign out everywhere' }).click()
    await desk.arrives('/sign-in')
    await phone.goes('/cellar')
    expect(phone.path()).toBe('/sign-in?next=/cellar')
  })

  it('asks a person of several breweries where they are, and forgets the one when they go to the other', async () => {
    await server.db.asSuperuser(`insert into memberships (brewery_id, user_id, role)
      select b.id, u.id, 'cellarHand' from breweries b, users u where b.name = 'Quernhollow' and u.email = 'hand@sallowmere.example'`)
    const person = await visit(server.origin)
    await person.goes('/')
    await signIn(person, 'hand@sallowmere.example')
    await person.arrives('/breweries')
    await person.page.getByRole('button', { name: 'Sallowmere Brewing cellar hand' }).click()
    await person.arrives('/cellar')
    await person.page.getByRole('heading', { name: '1 Heron' }).waitFor()
    await person.page.getByRole('link', { name: /Jory Athellow/ }).click()
    await person.page.getByRole('link', { name: 'Go to another brewery' }).click()
    await person.page.getByRole('button', { name: /^Quernhollow/ }).click()
    await person.arrives('/cellar')
    await person.page.getByRole('heading', { name: 'Cellar' }).waitFor()
    expect(await person.page.getByRole('heading', { name: '1 Heron' }).count()).toBe(0)
  })

  it('can be gone through by keyboard alone', async () => {
    const person = await visit(server.origin)
    const { keyboard } = person.page
    await person.goes('/sign-in')
    await keyboard.press('Tab')
    await keyboard.type('lead@sallowmere.example')
    await keyboard.press('Tab')
    await keyboard.type(DEMO_PASSWORD)
    await keyboard.press('Enter')
    await person.arrives('/cellar')
  })
})
