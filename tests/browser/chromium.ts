import { AxeBuilder } from '@axe-core/playwright'
import type { Browser, BrowserContext, Page } from 'playwright-core'
import { chromium } from 'playwright-core'
import { signedIn } from '../support/visitor'

const FLAGS = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync']

export const DESK = { width: 1280, height: 800 }
export const TABLET = { width: 1024, height: 768 }
export const PHONE = { width: 390, height: 844 }
export const SIZES = { desk: DESK, tablet: TABLET, phone: PHONE }
export const THEMES = ['day', 'night'] as const

export function launchChromium(): Promise<Browser> {
  return chromium.launch({ executablePath: '/usr/bin/chromium', args: FLAGS })
}

interface Visit {
  /** The address that somebody signs in with; nobody, if left out. */
  as?: string
  size?: { width: number, height: number }
  theme?: (typeof THEMES)[number]
}

/** A browser of a person at one server: its own cookies, its own storage, and a list of all that the browser complained of. */
export class Person {
  readonly complaints: string[] = []
  private constructor(readonly context: BrowserContext, readonly page: Page, readonly origin: string) {}

  static async visiting(browser: Browser, origin: string, { as, size = DESK, theme = 'day' }: Visit = {}): Promise<Person> {
    const context = await browser.newContext({ viewport: size, colorScheme: theme === 'day' ? 'light' : 'dark', locale: 'en-GB', timezoneId: 'Europe/Copenhagen' })
    if (as !== undefined) await context.addCookies([await cookieOf(origin, as)])
    // Told through the console, where it is listened to in any case.
    await context.addInitScript(() => document.addEventListener('securitypolicyviolation', event => console.error(`CSP: ${event.violatedDirective} ${event.blockedURI}`)))
    const person = new Person(context, await context.newPage(), origin)
    person.listen(person.page)
    return person
  }

  private listen(page: Page): void {
    page.on('pageerror', error => this.complaints.push(`thrown: ${error.message}`))
    page.on('console', (message) => {
      // An answer with a status of its own, or none at all, is for the page to deal with: that it does is asked elsewhere.
      if (['error', 'warning'].includes(message.type()) && !message.text().startsWith('Failed to load resource')) this.complaints.push(message.text())
    })
  }

  /** Goes to a path and waits until the page has come alive: before that, what is typed would be lost. */
  async goes(path: string): Promise<void> {
    await this.page.goto(this.origin + path)
    await alive(this.page)
  }

  path(): string {
    return this.page.url().slice(this.origin.length)
  }

  async arrives(path: string): Promise<void> {
    await this.page.waitForURL(this.origin + path)
  }

  /** A second tab of the same person. */
  async opensTab(path: string): Promise<Page> {
    const page = await this.context.newPage()
    this.listen(page)
    await page.goto(this.origin + path)
    await alive(page)
    return page
  }

  leaves(): Promise<void> {
    return this.context.close()
  }
}

const cookies = new Map<string, string>()

async function cookieOf(origin: string, email: string) {
  const known = cookies.get(origin + email) ?? (await signedIn(origin, email)).cookie ?? ''
  cookies.set(origin + email, known)
  const [name = '', value = ''] = known.split('=')
  return { name, value, url: origin }
}

async function alive(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const started: unknown = Reflect.get(window, 'useNuxtApp')
    return typeof started === 'function' && started().isHydrating === false
  })
}

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

/** What axe finds wrong with the page as it stands, in lines that can be acted on. */
export async function violations(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).withTags(RULES).options({ rules: { 'target-size': { enabled: true } } }).analyze()
  return violations.flatMap(({ id, nodes }) => nodes.map(node => `${id}: ${node.target.join(' ')} ${node.failureSummary?.replace(/\s+/g, ' ') ?? ''}`))
}

/** Whatever can be pressed or typed in and is smaller than a hand needs. Words inside a sentence do not count. */
export function tooSmall(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const SMALLEST = 44
    return [...document.querySelectorAll<HTMLElement>('a[href], button, input, select, textarea, summary, [role=button]')]
      .filter(element => element.checkVisibility({ opacityProperty: false, visibilityProperty: true }) && !element.classList.contains('skip'))
      .filter((element) => {
        const { width, height } = element.getBoundingClientRect()
        return width < SMALLEST - 0.5 || height < SMALLEST - 0.5
      })
      .map((element) => {
        const { width, height } = element.getBoundingClientRect()
        return `${element.tagName} "${element.innerText || element.id}" ${Math.round(width)} × ${Math.round(height)}`
      })
  })
}

/** By how much the page is wider than its window. */
export function overhang(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
}
