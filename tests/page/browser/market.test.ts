import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { TestBrowser, type TestPage } from '../driver/driver';
import { Person } from '../driver/person';

describe('the market in Chromium', () => {
  let browser: TestBrowser;
  let page: TestPage;
  let person: Person;

  beforeAll(async () => {
    browser = await TestBrowser.launch('chromium');
  });
  afterAll(() => browser?.close());
  beforeEach(async () => {
    page = await browser.open(pageFile);
    await page.raw.evaluate(() => localStorage.clear());
    await page.raw.reload();
    person = new Person(page);
    await person.settled();
  });
  afterEach(async () => {
    expect(page.messages).toEqual([]);
    await page.close();
  });

  const cells = (region: string, row: number): Promise<string[]> =>
    page.raw.$$eval(`[aria-label="${region}"] tbody tr:nth-child(${row}) :is(th, td)`, (found) =>
      found.map((cell) => cell.textContent?.trim() ?? ''),
    );

  test('the holiday that was typed this morning moves the settlement date, and stands in the calendar', async () => {
    await page.press('5');
    await page.raw.waitForSelector('[aria-label="When what is dealt settles"]');
    const before = await cells('When what is dealt settles', 1);
    expect(before[1]).toContain('3 Dec 2026');
    await person.put('Further holidays', '3 Dec 26');
    await page.raw.waitForFunction(
      () =>
        document
          .querySelector('[aria-label="When what is dealt settles"] tbody tr td')
          ?.textContent?.includes('4 Dec 2026') === true,
    );
    await person.see('closed by your own list');
    await page.raw.waitForSelector('.month .closed');
  });

  test('eighteen months are shown, each with its business days', async () => {
    await page.press('5');
    await page.raw.waitForSelector('.month');
    expect((await page.raw.$$('.month')).length).toBe(18);
    await person.see('Christmas');
  });

  test('instruments pasted from a spreadsheet make a curve that gives them back, and a price', async () => {
    const before = await person.prices();
    await person.press('Funding');
    await person.press('Instruments');
    await person.pricesAfter(before);
    await page.raw.$$eval('[aria-label="Instruments"] .remove', (found) =>
      found.forEach((button) => (button as HTMLElement).click()),
    );
    for (;;) {
      const remove = await page.raw.$('[aria-label="Instruments"] .remove');
      if (remove === null) break;
      await remove.evaluate((button) => (button as HTMLElement).click());
      await page.nextFrame();
    }
    await person.paste(
      'Instrument 1, What',
      'Instrument\tTenor\tRate\ndepo\t1M\t2.05\nFRA\t1x4\t2.10\nOIS\t1Y\t2.20\nOIS\t2Y\t2.35',
    );
    await person.settled();
    await person.press('Sensitivities');
    await person.see('FRA 1M–4M');
    await page.raw.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
    await page.press('5');
    await page.raw.waitForSelector('[aria-label="Instruments and what the curve makes of them"]');
    const rows = await page.raw.$$eval(
      '[aria-label="Instruments and what the curve makes of them"] tbody tr',
      (found) => found.map((row) => [...row.querySelectorAll('td')].map((cell) => cell.textContent?.trim() ?? '')),
    );
    expect(rows.length).toBe(4);
    for (const row of rows) {
      expect(row[2]).toBe(row[3]);
      expect(row[4]).toBe('none');
    }
  });

  test('an instrument that cannot be is named at its row, and the last price stays', async () => {
    const before = await person.prices();
    await person.press('Funding');
    await person.press('Instruments');
    await person.pricesAfter(before);
    await person.put('Instrument 4, Tenor', '5x8');
    await person.see('give one that fills the gap');
    await page.raw.waitForSelector('.quote[data-stale="true"]');
  });

  test('forward points of a pair are given back on both sides', async () => {
    await page.press('5');
    await person.press('EUR/USD');
    await person.press('From forwards quoted');
    await person.press('Base currency');
    await page.raw.waitForSelector('[aria-label="Forwards quoted and what is implied by them"] tbody tr');
    const rows = await page.raw.$$eval('[aria-label="Forwards quoted and what is implied by them"] tbody tr', (found) =>
      found.map((row) => [...row.querySelectorAll('td')].map((cell) => cell.textContent?.trim() ?? '')),
    );
    expect(rows.length).toBe(6);
    for (const row of rows) expect(row[0]).toBe(row[1]);
  });

  test('what is usual in a market fills the sheet, says its source, and an edited figure says so', async () => {
    await page.press('5');
    await person.choose('As is usual for', 'shares-uk');
    await person.see('Finance Act 1986, section 87');
    expect(await (await person.field('To buy')).evaluate((field) => field.value)).toBe('0.5');
    await person.put('Settles after', '3');
    await person.see('Edited since: settlement.');
    await person.press('Set them again');
    await page.raw.waitForFunction(() => !document.body.innerText.includes('Edited since'));
    expect(await (await person.field('Settles after')).evaluate((field) => field.value)).toBe('2');
  });

  test('a distribution that is passed on to the client is no longer in the price', async () => {
    const before = await person.prices();
    await person.press('Income');
    const summary = await page.raw.waitForSelector('.distribution summary');
    await summary?.evaluate((line) => (line as HTMLElement).click());
    await person.choose('It is', 'passed-through');
    const after = await person.pricesAfter(before);
    expect(Number(after[0])).toBeGreaterThan(Number(before[0]));
    await page.raw.$$eval('[role="tab"]', (tabs) =>
      (tabs.find((tab) => tab.textContent?.startsWith('Income')) as HTMLElement | undefined)?.click(),
    );
    await person.see('passed on to the client when it is paid');
    await person.see('would take');
  });
});
