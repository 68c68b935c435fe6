import { AxeBuilder } from '@axe-core/playwright';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newVisitor, openBrowser, shots, signIn, type Visitor } from '../fixtures.ts';
import { ReviewPages } from '../pages/review-pages.ts';
import { findPlaces, type Places } from '../places.ts';

const standards = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

const reviewer = 'Ines Carrow';
const approver = 'Mirela Haddow';
const buyer = 'Ravi Stonelake';
const second = 'Nils Orrey';
const moulder = 'Petra Lohm';

type Visit = readonly [name: string, person: string | null, path: (places: Places) => string];

/** Every page of the route table, for a person it is made for, on the demonstration. */
const visits: readonly Visit[] = [
  ['sign-in', null, () => '/sign-in'],
  ['forgotten-password', null, () => '/forgotten-password'],
  ['invitation', null, () => '/invitation/expired-link'],
  ['password-reset', null, () => '/password-reset/expired-link'],
  ['account', reviewer, () => '/account'],
  ['not-found', reviewer, () => '/no-such-page'],
  ['worklist', second, () => '/worklist'],
  ['worklist-all', moulder, () => '/worklist?show=all'],
  ['review-desk', reviewer, () => '/review-desk'],
  ['review-desk-all', reviewer, () => '/review-desk?show=all'],
  ['requests', reviewer, () => '/requests'],
  ['request-new', reviewer, () => '/requests/new'],
  ['request-draft', reviewer, ({ request }) => `/requests/${request.draft}`],
  ['request-issued', second, ({ request }) => `/requests/${request.issued}`],
  ['package-overview', second, ({ bracket }) => `/submissions/${bracket.preparing}`],
  ['package-evidence', second, ({ bracket }) => `/submissions/${bracket.preparing}/evidence`],
  ['package-measurements', second, ({ bracket }) => `/submissions/${bracket.preparing}/measurements`],
  ['package-import', second, ({ bracket }) => `/submissions/${bracket.preparing}/import`],
  ['package-check', second, ({ bracket }) => `/submissions/${bracket.preparing}/check`],
  ['package-deviations', second, ({ bracket }) => `/submissions/${bracket.preparing}/deviations`],
  ['package-warrant', second, ({ bracket }) => `/submissions/${bracket.preparing}/warrant`],
  ['submitted-overview', reviewer, ({ bracket }) => `/submissions/${bracket.submitted}`],
  ['submitted-review', reviewer, ({ bracket }) => `/submissions/${bracket.submitted}/review`],
  ['submitted-disposition', approver, ({ bracket }) => `/submissions/${bracket.submitted}/disposition`],
  ['submitted-evidence', reviewer, ({ bracket }) => `/submissions/${bracket.submitted}/evidence`],
  ['submitted-check', reviewer, ({ bracket }) => `/submissions/${bracket.submitted}/check`],
  ['decided-measurements', reviewer, ({ cover }) => `/submissions/${cover.interim}/measurements`],
  ['decided-review', reviewer, ({ manifold }) => `/submissions/${manifold.approved}/review`],
  ['decided-deviations', reviewer, ({ cover }) => `/submissions/${cover.interim}/deviations`],
  ['decided-warrant', moulder, ({ cover }) => `/submissions/${cover.interim}/warrant`],
  ['decided-disposition', moulder, ({ cover }) => `/submissions/${cover.interim}/disposition`],
  ['rejected-disposition', reviewer, ({ manifold }) => `/submissions/${manifold.rejected}/disposition`],
  ['buying-status', buyer, () => '/buying-status'],
  ['buying-line', buyer, ({ cover }) => `/buying-status/${cover.line}`],
  ['parts', reviewer, () => '/parts'],
  ['part', reviewer, ({ part }) => `/parts/${part.id}`],
  ['revision', reviewer, ({ part }) => `/parts/${part.id}/revisions/${part.newest}`],
  ['revision-draft', reviewer, ({ draft }) => `/parts/${draft.partId}/revisions/${draft.revisionId}`],
  [
    'characteristic-import',
    reviewer,
    ({ draft }) => `/parts/${draft.partId}/revisions/${draft.revisionId}/import`,
  ],
  [
    'comparison',
    reviewer,
    ({ part }) => `/parts/${part.id}/revisions/${part.newest}/comparison?with=${part.before}`,
  ],
  ['gauges', second, () => '/gauges'],
  ['people', approver, () => '/people'],
  ['suppliers', approver, () => '/suppliers'],
  ['audit', approver, () => '/audit'],
];

/** Answers the portal counts on, which the browser itself writes to its console: nobody is signed in, an old link. */
const expected = /status of (401 .*\/api\/session|404 .*\/api\/account-tokens\/)/;

describe('every page, in light and dark, wide and narrow', () => {
  let browser: Browser;
  let places: Places;
  const visitors = new Map<string | null, Visitor>();

  beforeAll(async () => {
    browser = await openBrowser();
    const names = new Set(visits.map(([, person]) => person));
    for (const name of names) {
      const visitor = await newVisitor(browser);
      visitors.set(name, name === null ? visitor : await signIn(visitor, name));
    }
    places = await findPlaces(visitorOf(reviewer).context.request);
  });
  afterAll(() => browser?.close());

  const visitorOf = (name: string | null) => {
    const visitor = visitors.get(name);
    if (!visitor) throw new Error(`Nobody came as ${name}`);
    return visitor;
  };

  it.each(visits)('%s is accessible, keeps to the content policy and fits', async (name, person, path) => {
    const { page, faults } = visitorOf(person);
    faults();
    await page.setViewportSize({ width: 1280, height: 900 });
    await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
    const address = path(places);
    await page.goto(address);
    await settled(page);
    expect(new URL(page.url()).pathname).toBe(address.split('?')[0]);
    const found: string[] = [];
    for (const [width, height] of [
      [1280, 900],
      [390, 844],
    ] as const) {
      await page.setViewportSize({ width, height });
      await settled(page);
      for (const colorScheme of ['light', 'dark'] as const) {
        await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
        await page.screenshot({ path: join(shots, `${name}-${width}-${colorScheme}.png`), fullPage: true });
        found.push(...(await barriers(page)).map((words) => `${colorScheme} ${width}: ${words}`));
      }
      found.push(...(await overflow(page)).map((words) => `${width}: ${words}`));
    }
    const seen = faults().filter((fault) => person !== null || !expected.test(fault));
    expect({ found, seen }).toEqual({ found: [], seen: [] });
  });
});

describe('the drawing beside the review', () => {
  it('is drawn from the demonstration under the content policy', async () => {
    const browser = await openBrowser();
    try {
      const { page, faults, context } = await signIn(await newVisitor(browser), reviewer);
      const { bracket } = await findPlaces(context.request);
      await page.goto(`/submissions/${bracket.submitted}/review?drawing=yes`);
      const review = new ReviewPages(page);
      await review.drawing.first().waitFor();
      await expect.poll(() => review.inkOnDrawing(), { timeout: 20_000 }).toBeGreaterThan(1000);
      await page.screenshot({ path: join(shots, 'review-drawing-1280-light.png'), fullPage: true });
      expect(faults()).toEqual([]);
    } finally {
      await browser.close();
    }
  });
});

/** The page has its heading and nothing is being fetched any more. */
async function settled(page: Page): Promise<void> {
  await page.locator('h1').first().waitFor();
  await page.waitForLoadState('networkidle');
  await page.locator('[aria-busy="true"]').first().waitFor({ state: 'detached' });
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
}

async function barriers(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).withTags(standards).setLegacyMode(true).analyze();
  return violations.map(
    ({ id, nodes }) =>
      `${id} at ${nodes
        .slice(0, 4)
        .map((node) => `${node.target.join(' ')} (${node.any[0]?.message ?? node.all[0]?.message ?? ''})`)
        .join('; ')}`,
  );
}

/** What is wider than the window, so that the whole page would scroll sideways. */
function overflow(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const width = document.documentElement.clientWidth;
    if (document.documentElement.scrollWidth <= width) return [];
    const wide = [...document.querySelectorAll('body *')].filter(
      (element) => element.getBoundingClientRect().right > width + 1,
    );
    return [
      `scrolls sideways to ${document.documentElement.scrollWidth}`,
      ...wide.slice(0, 6).map((element) => `${element.tagName} ${element.className}`),
    ];
  });
}
