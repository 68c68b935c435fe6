import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  address,
  demoPeople,
  newVisitors,
  openBrowser,
  showWhereItStands,
  signIn,
  type Visitor,
} from '../fixtures.ts';
import { dayFromNow, pdfFile } from '../pages/acts.ts';
import { BuyingPage } from '../pages/buying-page.ts';
import { MeasurementPages } from '../pages/measurement-pages.ts';
import { PackagePages } from '../pages/package-pages.ts';
import { PartPages } from '../pages/part-pages.ts';
import { RequestPages } from '../pages/request-pages.ts';
import { ReviewPages } from '../pages/review-pages.ts';
import { SignInPage } from '../pages/sign-in-page.ts';
import { characteristics, element, gauge, part, table } from '../story-data.ts';

/** One story told in order: each step stands on the one before. */
describe.sequential('from the request to the approval, by three people', () => {
  let browser: Browser;
  let reviewer: Visitor;
  let supplier: Visitor;
  let buyer: Visitor;
  let password = '';
  let firstBroken: string | null = null;

  beforeAll(async () => {
    browser = await openBrowser();
    [reviewer, supplier, buyer] = await newVisitors(browser);
    ({ password } = await demoPeople());
    for (const { context } of [reviewer, supplier])
      await context.grantPermissions(['clipboard-read', 'clipboard-write'], { origin: address });
    await signIn(supplier, 'Henrik Sall');
    await signIn(buyer, 'Ravi Stonelake');
  });
  afterAll(() => browser?.close());

  const step = (title: string, tell: () => Promise<void>) =>
    it(title, async () => {
      expect(firstBroken, 'an earlier step of the story').toBeNull();
      firstBroken = title;
      await tell().catch(async (reason: unknown) => {
        await showWhereItStands({ reviewer, supplier, buyer });
        throw reason;
      });
      firstBroken = null;
    });

  step('the reviewer signs in, at first with a wrong password', async () => {
    const signInPage = new SignInPage(reviewer.page);
    await signInPage.open();
    const { people } = await demoPeople();
    const email = people.find((person) => person.name === 'Mirela Haddow')?.email ?? '';
    await signInPage.signIn(email, 'not the password');
    await signInPage.failure.first().waitFor();
    await signInPage.signIn(email, password);
    await reviewer.page.getByRole('heading', { level: 1, name: 'Review desk' }).waitFor();
  });

  step('and releases a part with its drawing and four characteristics', async () => {
    const parts = new PartPages(reviewer.page);
    await parts.openParts();
    await parts.create(part);
    await parts.openRevision('A');
    await parts.attachDrawing(pdfFile('guide-bush-a.pdf', `Guide bush ${part.number} rev A`));
    await parts.pasteCharacteristics(characteristics);
    await parts.characteristics.getByText('12.000 … 12.018').waitFor();
    await parts.saved.waitFor();
    await parts.release('A');
    await parts.released.waitFor();
  });

  step('asks a supplier for its approval', async () => {
    const requests = new RequestPages(reviewer.page);
    await requests.openNew();
    await requests.fill({
      part: part.number,
      supplier: 'Quillmark Turning',
      site: 'Quillmark',
      level: '4: ',
      ownElement: element,
      streamKind: 'Spindles',
      streams: ['spindle 1', 'spindle 2'],
      pieces: 3,
      due: dayFromNow(30),
      message: 'First parts from the new bar stock.',
    });
    await requests.saveDraft();
    await requests.issue();
    await requests.issued.waitFor();
  });

  step('the supplier acknowledges it and says when the sample pieces were made', async () => {
    const { page } = supplier;
    await page.goto('/worklist');
    const packages = new PackagePages(page);
    await packages.openFromDesk(part.number);
    const requests = new RequestPages(page);
    await requests.message.getByText('First parts from the new bar stock.').waitFor();
    await requests.acknowledge.click();
    await packages.openTab('Evidence');
    for (const piece of ['1-1', '1-2', '1-3', '2-1', '2-2', '2-3'])
      await packages.datePiece(piece, dayFromNow(-3), 'H-204');
  });

  step('imports readings written with the decimal comma', async () => {
    const sheet = new MeasurementPages(supplier.page);
    await new PackagePages(supplier.page).openTab('Measurements');
    await sheet.openImport();
    await sheet.sendTable({ name: 'readings.csv', mimeType: 'text/csv', buffer: Buffer.from(table) });
    expect(await sheet.decimalSign.inputValue()).toBe(',');
    await sheet.writeReadings();
    await sheet.written.waitFor();
    expect(await sheet.written.textContent()).toBe('18 readings written and judged');
    await sheet.backToSheet();
    expect(await sheet.cell(1, 2).textContent()).toContain('12.080');
  });

  step('types, pastes and takes back readings in the grid', async () => {
    const sheet = new MeasurementPages(supplier.page);
    await sheet.stand(2, 0);
    await sheet.type('18.01', 'Tab');
    await sheet.type('18.00', 'Tab');
    await sheet.type('17.98', 'Enter');
    expect(await sheet.cell(2, 1).textContent()).toContain('18.00');
    await sheet.press('ArrowUp');
    await sheet.press('ArrowRight');
    await sheet.paste([['18.02', '18.03', '17.99']]);
    await expect.poll(() => sheet.cell(2, 5).textContent()).toContain('17.99');
    await sheet.press('Delete');
    await expect.poll(() => sheet.cell(2, 3).textContent()).not.toContain('18.02');
    await sheet.press('Control+z');
    await expect.poll(() => sheet.cell(2, 3).textContent()).toContain('18.02');
    await sheet.saved.waitFor();
  });

  step('sees what the check found, and mends the slip', async () => {
    const { page } = supplier;
    const packages = new PackagePages(page);
    await packages.openTab('Findings');
    const bore = packages.stops.filter({ hasText: 'Balloon 2' }).filter({ hasText: /out of tolerance/i });
    await bore.first().waitFor();
    await packages.openTab('Measurements');
    const sheet = new MeasurementPages(page);
    await sheet.stand(1, 2);
    await sheet.type('12.008', 'Enter');
    await sheet.saved.waitFor();
    await packages.openTab('Findings');
    await packages.stops
      .filter({ hasText: 'Balloon 4' })
      .filter({ hasText: /out of tolerance/i })
      .first()
      .waitFor();
    await expect.poll(() => bore.count(), { timeout: 15_000 }).toBe(0);
  });

  step('names gauge and date, and asks a deviation for the row that stays out', async () => {
    const { page } = supplier;
    const packages = new PackagePages(page);
    await packages.openTab('Measurements');
    await new MeasurementPages(page).fillGaugeAndDate(gauge, dayFromNow(-2));
    await packages.openTab('Deviations');
    await packages.askDeviation({
      lower: '1.88',
      cause: 'Insert of spindle 2 worn; found after the run.',
      containment: 'The lot is held apart and marked.',
      pieces: '500',
      until: dayFromNow(60),
    });
    await packages.openTab('Evidence');
    await packages.attach(element, pdfFile('certificate.pdf', 'Material certificate C45'));
  });

  step('states the run and signs, at first with a wrong password', async () => {
    const { page } = supplier;
    const packages = new PackagePages(page);
    await packages.openTab('Warrant');
    await packages.stateRun({ on: dayFromNow(-3), hours: '8', pieces: '600', mass: '0.084' });
    expect(await packages.blockers.count(), await page.getByRole('main').innerText()).toBe(0);
    await packages.startSigning();
    await packages.giveSignature('not the password');
    await packages.passwordError.waitFor();
    await packages.giveSignature(password);
    await page.getByText('Henrik Sall').first().waitFor();
    await page.getByRole('dialog').waitFor({ state: 'detached' });
  });

  step('the reviewer sees the drawing and grants the deviation', async () => {
    const { page } = reviewer;
    const packages = new PackagePages(page);
    await page.goto('/review-desk');
    await packages.openFromDesk(part.number);
    await packages.openTab('Review');
    const review = new ReviewPages(page);
    await review.marked.waitFor();
    await review.showDrawing();
    await review.drawing.first().waitFor();
    await expect.poll(() => review.inkOnDrawing(), { timeout: 20_000 }).toBeGreaterThan(100);
    await packages.openTab('Deviations');
    await packages.grantDeviation('Depth of the groove is not functional above 1.88.');
    await packages.granted.waitFor();
  });

  step('accepts clean rows in bulk and the others with the keyboard', async () => {
    const { page } = reviewer;
    await new PackagePages(page).openTab('Review');
    const review = new ReviewPages(page);
    await review.acceptCleanRows();
    await expect.poll(() => review.marked.textContent()).toBe('2 of 4 marked');
    for (const [balloon, marked] of [
      ['2', '3 of 4 marked'],
      ['4', '4 of 4 marked'],
    ] as const) {
      await review.select(balloon);
      await review.press('a');
      await expect.poll(() => review.marked.textContent()).toBe(marked);
    }
    await review.acceptElements([element, 'Part submission warrant']);
  });

  step('signs an interim approval with a condition', async () => {
    const { page } = reviewer;
    await new PackagePages(page).openTab('Disposition');
    const review = new ReviewPages(page);
    await review.chooseOutcome('Interim approval');
    await review.limit({
      until: dayFromNow(45),
      pieces: '500',
      containment: 'The supplier measures the groove of every piece.',
    });
    await review.addCondition(
      'New insert on spindle 2, groove measured again',
      'Henrik Sall',
      dayFromNow(30),
    );
    await review.sign(password);
    await review.signed.getByText('Mirela Haddow').first().waitFor();
  });

  step('the buyer reads within which limits may be bought', async () => {
    const buying = new BuyingPage(buyer.page);
    await buying.find(part.number);
    const line = buying.line(part.number);
    await line.getByText('may buy within limits').waitFor();
    expect(await line.textContent()).toContain('500');
  });

  step('the supplier mends the row and submits a second round', async () => {
    const { page } = supplier;
    const packages = new PackagePages(page);
    await packages.openTab('Overview');
    await page.reload();
    await new RequestPages(page).startRound(2);
    await page.getByText('in preparation').first().waitFor();
    await packages.openTab('Measurements');
    const sheet = new MeasurementPages(page);
    await sheet.stand(3, 3);
    await sheet.paste([['2.01', '2.00', '2.02']]);
    await sheet.saved.waitFor();
    await expect.poll(() => sheet.cell(3, 5).textContent()).toContain('2.02');
    await packages.openTab('Warrant');
    await packages.startSigning();
    await packages.giveSignature(password);
    await page.getByRole('dialog').waitFor({ state: 'detached' });
  });

  step('the reviewer approves it', async () => {
    const { page } = reviewer;
    const packages = new PackagePages(page);
    await page.goto('/review-desk');
    await packages.openFromDesk(part.number);
    await packages.openTab('Review');
    const review = new ReviewPages(page);
    await review.acceptCleanRows();
    await review.select('2');
    await review.press('a');
    await expect.poll(() => review.marked.textContent()).toBe('4 of 4 marked');
    await review.acceptElements([element, 'Part submission warrant']);
    await packages.openTab('Disposition');
    await review.chooseOutcome('Approved');
    await review.sign(password);
    await review.signed.getByText('Mirela Haddow').first().waitFor();
  });

  step('the buyer reads that the part may be bought', async () => {
    const buying = new BuyingPage(buyer.page);
    await buying.find(part.number);
    await buying.line(part.number).getByText('may buy', { exact: true }).waitFor();
  });

  step('nothing was reported by any of the three browsers', async () => {
    const wrongPasswords = /status of (401|422) .*\/api\/(session|submissions\/[^/]+\/warrant\/signature)/;
    const seen = [reviewer, supplier, buyer].flatMap(({ faults }) => faults());
    expect(seen.filter((fault) => !wrongPasswords.test(fault))).toEqual([]);
  });
});
