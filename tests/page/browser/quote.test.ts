import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { afterAll, beforeAll, beforeEach, afterEach, describe, expect, test } from 'vitest';
import { buildFolder, pageFile } from '../driver/built';
import { TestBrowser, type TestPage } from '../driver/driver';
import { Downloads, Person } from '../driver/person';

const models = [
  'vasicek',
  'cox-ingersoll-ross',
  'ho-lee',
  'hull-white',
  'policy-meetings',
  'scenarios',
  'samples',
] as const;

describe('quoting in Chromium', () => {
  let browser: TestBrowser;
  let page: TestPage;
  let person: Person;

  beforeAll(async () => {
    browser = await TestBrowser.launch('chromium');
  });
  afterAll(() => browser?.close());
  beforeEach(async () => {
    page = await browser.open(pageFile);
    // Pages from the disk share what the browser keeps: each test begins with nothing kept.
    await page.raw.evaluate(() => localStorage.clear());
    await page.raw.reload();
    person = new Person(page);
    await person.settled();
  });
  afterEach(async () => {
    expect(page.messages).toEqual([]);
    await page.close();
  });

  test('with the keyboard alone, a price stands for what was typed', async () => {
    const before = await person.prices();
    for (let tabs = 0; tabs < 60; ++tabs) {
      if ((await page.raw.evaluate(() => document.activeElement?.id)) === 'inquiry-client') break;
      await page.press('Tab');
    }
    await page.press('Enter');
    await page.press('Control', 'a');
    await page.raw.keyboard.type('25k');
    await page.press('Enter');
    await page.press('Enter');
    await page.press('Control', 'a');
    await page.raw.keyboard.type('3M');
    const [bid, offer] = await person.pricesAfter(before);
    expect(Number(bid)).toBeLessThan(Number(offer));
    await person.see('25,000');
    await person.see('1 Mar 2027');
    await page.raw.waitForFunction(
      (wanted: string) =>
        [...document.querySelectorAll('[aria-live="polite"]')].some((said) => said.textContent === wanted),
      {},
      `bid ${bid}, offer ${offer}`,
    );
  });

  test('one side asked for is one quote; the other stays a break-even', async () => {
    await person.choose('What the client does', 'buys');
    await person.see('Break-even bid');
    await person.see('We offer');
  });

  test('wrong input is marked at its field in the core’s words, the last price stays greyed, and comes back', async () => {
    const before = await person.prices();
    await person.put('Maturity, a date or a tenor', '26 Mar 27');
    await person.see('is no business day');
    expect(
      await (
        await person.field('Maturity, a date or a tenor')
      ).evaluate((field) => field.ariaInvalid ?? field.getAttribute('aria-invalid')),
    ).toBe('true');
    await page.raw.waitForSelector('.quote[data-stale="true"]');
    expect(await person.prices()).toEqual(before);
    await person.put('Maturity, a date or a tenor', '15 Dec 27');
    expect(await person.settled()).toEqual(before);
  });

  test('a bare m in an amount is a question', async () => {
    await person.type('Quantity', '1.5m');
    await person.see('mn');
    await page.raw.waitForSelector('.quote[data-stale="true"]');
    await person.type('Quantity', '1.5mn');
    await person.settled();
    await person.see('1,500,000');
  });

  test('undo and redo go through everything typed', async () => {
    const first = await person.prices();
    await person.press('Spot');
    await person.type('Offer', '49.66');
    const second = await person.pricesAfter(first);
    await page.raw.keyboard.down('Control');
    for (let steps = 0; steps < 12 && (await person.prices()).join() !== first.join(); ++steps) {
      await page.raw.keyboard.press('z');
      await page.nextFrame();
    }
    await page.raw.keyboard.up('Control');
    expect(await person.settled()).toEqual(first);
    for (let steps = 0; steps < 12 && (await person.prices()).join() !== second.join(); ++steps) {
      await page.press('Control', 'y');
      await page.nextFrame();
    }
    expect(await person.settled()).toEqual(second);
  });

  test('rows pasted from a spreadsheet are taken; what is not understood stays marked in its place', async () => {
    const before = await person.prices();
    await person.press('Income');
    await person.paste(
      'Distribution 1, Ex',
      'Ex date\tPay date\tAmount\n10 Mar 27\t24 Mar 27\t0.80\n9 Jun 27\t23 Jun 27\t0.90\n',
    );
    const pasted = await person.pricesAfter(before);
    await person.paste('Distribution 1, Ex', '2027-09-08;2027-09-22;0,75\nsometime;2027-10-22;0,10\n');
    await page.raw.waitForSelector('.row-error');
    expect(await page.raw.$$eval('input', (fields) => fields.some((field) => field.value === 'sometime'))).toBe(true);
    await page.press('Control', 'z');
    expect(await person.settled()).toEqual(pasted);
  });

  test('every kind of funding gives a price, and the program gives each quote again letter for letter', async () => {
    const downloads = new Downloads();
    await downloads.of(page);
    const give = async (): Promise<void> => {
      await person.settled();
      const given = await page.raw.$$eval('.news', (news) => news.map((said) => said.textContent).join());
      await page.press('Alt', 'g');
      await page.raw.waitForFunction(
        (old: string) => [...document.querySelectorAll('.news')].map((said) => said.textContent).join() !== old,
        {},
        given,
      );
      await person.press('Close');
      await page.raw.waitForFunction(() => document.querySelector('.news p') === null);
    };
    await person.press('Funding');
    await give();
    const curve = await person.prices();
    await person.press('Flat');
    const flat = await person.pricesAfter(curve);
    await person.see('Fair since');
    await give();
    await person.press('Random');
    await person.pricesAfter(flat);
    for (const model of models) {
      await person.choose('Model', model);
      await give();
    }
    await page.press('Alt', '4');
    await person.see('Quotes given');
    await person.press('Save the book');
    const book = JSON.parse(readFileSync(await downloads.file(page, 'forwright-book'), 'utf8')) as {
      quotes: { request: string; answer: string }[];
    };
    downloads.remove();
    expect(book.quotes).toHaveLength(2 + models.length);
    const answers = execFileSync(resolve(buildFolder, 'forwright'), {
      input: book.quotes.map(({ request }) => `${request}\n`).join(''),
      encoding: 'utf8',
    }).trimEnd();
    expect(answers.split('\n')).toEqual(book.quotes.map(({ answer }) => answer));
  });

  test('nothing moves while figures change', async () => {
    await page.raw.evaluate(() => {
      const counter = window as unknown as { shifted: number };
      counter.shifted = 0;
      new PerformanceObserver((list) => {
        for (const entry of list.getEntries()) counter.shifted += (entry as unknown as { value: number }).value;
      }).observe({ type: 'layout-shift' });
    });
    const before = await person.prices();
    await person.type('Maturity, a date or a tenor', '18 Jun 27');
    await person.pricesAfter(before);
    await person.type('Quantity', '12,500');
    await person.settled();
    expect(await page.raw.evaluate(() => (window as unknown as { shifted: number }).shifted)).toBeLessThan(0.1);
  });
});
