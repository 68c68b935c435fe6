import { mkdirSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { inject } from 'vitest';

export const address = inject('address');

/** Where pictures are left for a person to look at. */
export const shots = process.env.TRAMMEL_SHOTS ?? join(tmpdir(), 'shots');
mkdirSync(shots, { recursive: true });

const switches = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const openBrowser = (): Promise<Browser> =>
  chromium.launch({ executablePath: inject('chromium'), args: switches });

interface DemoPeople {
  readonly password: string;
  readonly people: readonly { readonly name: string; readonly email: string }[];
}

/** Names, mail addresses and the password the demonstration gives its people. */
export async function demoPeople(): Promise<DemoPeople> {
  const answer = await fetch(`${address}/api/demo/people`);
  if (!answer.ok) throw new Error(`The demo people are not there: ${answer.status}`);
  return (await answer.json()) as DemoPeople;
}

export interface Visitor {
  readonly context: BrowserContext;
  readonly page: Page;
  /** Everything that must not happen in a browser, in words. Emptied by reading it. */
  readonly faults: () => string[];
}

/** A browser of its own for one person; nobody is signed in. */
export async function newVisitor(browser: Browser, width = 1280, height = 900): Promise<Visitor> {
  const context = await browser.newContext({
    baseURL: address,
    viewport: { width, height },
    locale: 'en-GB',
    timezoneId: 'UTC',
    reducedMotion: 'reduce',
    acceptDownloads: true,
  });
  context.setDefaultTimeout(30_000);
  const seen: string[] = [];
  await context.exposeBinding('reportPolicyViolation', (_source, words: string) => void seen.push(words));
  await context.addInitScript(() => {
    document.addEventListener('securitypolicyviolation', (event) => {
      const report = (window as unknown as { reportPolicyViolation: (words: string) => void })
        .reportPolicyViolation;
      report(`content policy: ${event.violatedDirective} refused ${event.blockedURI} ${event.sample}`);
    });
  });
  const page = await context.newPage();
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type()))
      seen.push(`console ${message.type()}: ${message.text()} (${message.location().url})`);
  });
  page.on('pageerror', (error) => seen.push(`page error: ${error.message}`));
  page.on('request', (request) => {
    const url = new URL(request.url());
    if (url.protocol.startsWith('http') && url.origin !== address) seen.push(`foreign request: ${url.href}`);
  });
  return { context, page, faults: () => seen.splice(0) };
}

/** Signed in through the API: the sign-in page has its own story. */
export async function signIn(visitor: Visitor, name: string): Promise<Visitor> {
  const { people, password } = await demoPeople();
  const email = people.find((person) => person.name === name)?.email;
  if (!email) throw new Error(`${name} is not one of the demo people`);
  const answer = await visitor.context.request.post('/api/session', {
    data: { email, password },
    headers: { Origin: address },
  });
  if (!answer.ok()) throw new Error(`${name} was not let in: ${answer.status()} ${await answer.text()}`);
  return visitor;
}

/** What each of them has on the screen when a step fails. */
export async function showWhereItStands(visitors: Readonly<Record<string, Visitor>>): Promise<void> {
  for (const [name, { page }] of Object.entries(visitors))
    await page.screenshot({ path: join(shots, `broken-${name}.png`), fullPage: true });
}

/** Three people, each in a browser of their own. */
export function newVisitors(browser: Browser): Promise<[Visitor, Visitor, Visitor]> {
  return Promise.all([newVisitor(browser), newVisitor(browser), newVisitor(browser)]);
}
