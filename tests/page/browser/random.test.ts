import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { everyBrowser, TestBrowser, type TestPage } from '../driver/driver';
import { Person } from '../driver/person';

/** The digits after a phrase on the page, as they stand. */
async function figureAfter(page: TestPage, phrase: string): Promise<string> {
  const found = await page.raw.waitForFunction(
    (wanted: string) => {
      const text = document.body.innerText.replace(/\s+/g, ' ');
      const at = text.indexOf(wanted);
      return at < 0 ? null : (/[\d.,−-]*\d/.exec(text.slice(at + wanted.length))?.[0] ?? null);
    },
    {},
    phrase,
  );
  return String(await found.jsonValue());
}

async function toRandom(person: Person): Promise<void> {
  await person.press('Funding');
  const before = await person.prices();
  await person.press('Random');
  await person.pricesAfter(before);
  await person.press('Random discount');
}

async function chooseModel(person: Person, model: string): Promise<void> {
  const before = await person.prices();
  await person.choose('Model', model);
  await person.pricesAfter(before);
}

const simulated: string[] = [];

describe.each(everyBrowser)('simulating in %s', (name) => {
  let browser: TestBrowser;

  beforeAll(async () => {
    browser = await TestBrowser.launch(name);
  });
  afterAll(() => browser?.close());

  test('runs to its end beside the closed form, with the same digits in every browser', async () => {
    const page = await browser.open(pageFile);
    const person = new Person(page);
    await person.settled();
    await toRandom(person);
    await person.choose('Paths', '4096');
    await person.press('Simulate');
    await person.see('Done: 4,096 paths');
    const factor = await figureAfter(page, 'Simulated factor ');
    const closed = await figureAfter(page, 'in closed form ');
    expect(Math.abs(Number(factor) - Number(closed))).toBeLessThan(1e-5);
    simulated.push(factor);
    expect(
      simulated.every((other) => other === factor),
      simulated.join(),
    ).toBe(true);
    await person.see('path by path, then averaged: no price');
    await person.see('of its standard errors');
    await person.see('by the closed form’s law');
    await person.see('Thin: single paths');
    await person.see('Where rates may go');
    await person.see('Simulated discount factors');
    // The same values as a table, once they are asked for.
    expect(await page.raw.$('[aria-label="Simulated discount factors, values"]')).toBeNull();
    await page.raw.$$eval('.chart-values summary', (found) => found.forEach((summary) => summary.click()));
    await page.raw.waitForSelector('[aria-label="Simulated discount factors, values"]');
    await person.see('By the law');
    // Another sheet: what was simulated is told to be of the one before.
    await person.choose('Paths', '16384');
    await person.see('simulate again to see it');
    expect(page.messages).toEqual([]);
    await page.close();
  });
});

describe('random discounting in Chromium', () => {
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

  test('a simulation stops where it is told and goes on from there to the digits of one that was never stopped', async () => {
    await toRandom(person);
    await person.choose('Random numbers', 'pseudo');
    await person.choose('Paths', '4194304');
    await person.press('Simulate');
    await page.raw.waitForFunction(() => /[1-9][\d,]* paths so far/.test(document.body.innerText));
    await person.press('Stop');
    await person.see('Stopped after');
    const stoppedAt = Number((await figureAfter(page, 'Stopped after ')).replaceAll(',', ''));
    expect(stoppedAt).toBeGreaterThan(0);
    expect(stoppedAt).toBeLessThan(4194304);
    // The page goes on quoting meanwhile.
    await person.press('Go on');
    await person.see('Done: 4,194,304 paths');
    await person.see('Closing on the closed form');
    const stopped = await figureAfter(page, 'Simulated factor ');
    await person.press('Simulate again');
    await page.raw.waitForFunction(() => document.body.innerText.includes('paths so far'));
    await person.see('Done: 4,194,304 paths');
    expect(await figureAfter(page, 'Simulated factor ')).toBe(stopped);
  });

  test('as many Workers as there are processors to spare come to the same digits as one', async () => {
    const figures: string[] = [];
    for (const processors of [2, 4]) {
      await page.raw.evaluateOnNewDocument((count: number) => {
        Object.defineProperty(navigator, 'hardwareConcurrency', { value: count, configurable: true });
      }, processors);
      await page.raw.reload();
      await person.settled();
      await toRandom(person);
      // To the cent its prices are Vasicek's.
      await person.choose('Model', 'cox-ingersoll-ross');
      await person.see('Quantiles are right to');
      await person.choose('Paths', '65536');
      await person.press('Simulate');
      await person.see(processors === 2 ? 'Done: 65,536 paths' : 'Done: 65,536 paths, by 3 Workers');
      const table = await page.raw.$eval(
        '[aria-label="The forward reckoned in four ways"]',
        (found) => found.textContent ?? '',
      );
      figures.push(`${await figureAfter(page, 'Simulated factor ')} ${table}`);
      await page.raw.evaluate(() => localStorage.clear());
    }
    expect(figures[1]).toBe(figures[0]);
  });

  test('prices go on while a simulation runs', async () => {
    await toRandom(person);
    // The slowest of the models: it goes by steps.
    await person.choose('Model', 'cox-ingersoll-ross');
    await person.see('Quantiles are right to');
    await person.choose('Paths', '4194304');
    await person.press('Simulate');
    const before = await person.prices();
    await person.put('Quantity', '12k');
    await person.put('Maturity, a date or a tenor', '18 Jun 27');
    await person.pricesAfter(before);
    await person.press('Stop');
    await person.see('The sheet has changed since');
  });

  test('the tree of meetings is drawn with its odds, and changes where it stands', async () => {
    await toRandom(person);
    await chooseModel(person, 'policy-meetings');
    await page.raw.waitForSelector('svg[aria-label^="Overnight rate: from"]');
    const labelOf = () =>
      page.raw.$eval('svg[aria-label^="Overnight rate: from"]', (tree) => tree.getAttribute('aria-label') ?? '');
    const before = await labelOf();
    const prices = await person.prices();
    const editor = await page.raw.waitForSelector('.tree-editor summary');
    await editor?.evaluate((summary) => (summary as HTMLElement).click());
    const overnight = await page.raw.waitForSelector('.tree-editor input[data-at$="/overnight"]');
    await overnight?.evaluate((field) => {
      (field as HTMLInputElement).focus();
      (field as HTMLInputElement).select();
    });
    await page.raw.keyboard.sendCharacter('4.5');
    await person.pricesAfter(prices);
    await page.raw.waitForFunction(
      (old: string) =>
        document.querySelector('svg[aria-label^="Overnight rate: from"]')?.getAttribute('aria-label') !== old,
      {},
      before,
    );
    expect(await labelOf()).toContain('4.50');
  });

  test('a scenario may be random itself, with fields of its own', async () => {
    await toRandom(person);
    await chooseModel(person, 'scenarios');
    const before = await person.prices();
    await page.raw.waitForSelector('.scenario input[type="radio"][value="random"]');
    await page.raw.$eval('.scenario input[type="radio"][value="random"]', (radio) => (radio as HTMLElement).click());
    await page.raw.waitForSelector('.scenario [data-at$="/scenarios/0/curve/r0"]');
    await page.raw.waitForSelector('.quote[data-stale="true"]');
    for (const [member, text] of [
      ['r0', '2'],
      ['meanReversion', '0.1'],
      ['longRun', '3'],
      ['volatility', '1'],
    ] as const) {
      await page.type(`.scenario [data-at$="/scenarios/0/curve/${member}"]`, text);
    }
    const random = await person.pricesAfter(before);
    await page.type('.scenario [data-at$="/scenarios/0/curve/volatility"]', '11');
    await page.raw.waitForSelector('.quote[data-stale="false"]');
    await person.pricesAfter(random);
    await page.type('.scenario [data-at$="/scenarios/0/curve/volatility"]', '2000');
    await page.raw.waitForSelector('.scenario .field-error');
    await page.type('.scenario [data-at$="/scenarios/0/curve/volatility"]', '1');
    expect(await person.settled()).toEqual(random);
  });

  test('switching funding tells its change in money', async () => {
    await person.press('Funding');
    const before = await person.prices();
    await person.press('Flat');
    await person.pricesAfter(before);
    await page.raw.waitForFunction(() =>
      /Fair since Curve became Flat rate\s*[+−][\d.]+\s*was [\d.]+, EUR\s[+−][\d,.]+/.test(document.body.innerText),
    );
  });

  test('samples that disagree with the market’s curve are told of', async () => {
    await toRandom(person);
    await chooseModel(person, 'samples');
    await person.put(
      'Factors: a heading of dates, then one row a path',
      '1 Dec 2027\t1 Dec 2028\n0.90\t0.80\n0.91\t0.81\n0.905\t0.805',
    );
    await person.press('The curve');
    await person.see('The samples disagree with the market’s curve on 2 of 2 dates'.replace('’', "'"));
    await person.see('Apart, in errors');
    await person.press('nothing');
    await page.raw.waitForFunction(() => !document.body.innerText.includes('Apart, in errors'));
  });

  test('one inquiry under every funding: a fitted model gives its curve’s forward', async () => {
    await page.press('2');
    await person.press('By funding');
    await person.see('fitted to a curve: that curve’s forward, whatever its volatility');
    const rows = await page.raw.$$eval('[aria-label="The forward by funding"] tbody tr', (found) =>
      found.map((row) => [...row.querySelectorAll('th, td')].map((cell) => cell.textContent?.trim() ?? '')),
    );
    const fairOf = (beginning: string) => rows.find(([name]) => name?.startsWith(beginning))?.[1];
    expect(rows.length).toBeGreaterThan(5);
    expect(fairOf('Ho–Lee')).toBe(fairOf('Curve'));
    expect(fairOf('Hull–White')).toBe(fairOf('Curve'));
    expect(fairOf('Vasicek')).not.toBe(fairOf('Curve'));
    const scenarios = await page.raw.$$('.checks .check');
    await scenarios.at(-1)?.evaluate((label) => label.querySelector('input')?.click());
    await page.raw.waitForFunction(
      (count: number) =>
        document.querySelectorAll('[aria-label="The forward by funding"] tbody tr').length === count - 1,
      {},
      rows.length,
    );
    // One put by is compared with another of its own kind.
    await page.press('1');
    await toRandom(person);
    await page.raw.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
    await page.press('2');
    await person.press('Put this funding by');
    await person.see('Take out Vasicek: from');
    await page.press('1');
    const first = await person.prices();
    await person.put('Volatility', '3');
    await person.pricesAfter(first);
    await page.raw.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
    await page.press('2');
    const fairs = () =>
      page.raw.$$eval('[aria-label="The forward by funding"] tbody tr', (found) =>
        found
          .map((row) => [...row.querySelectorAll('th, td')].map((cell) => cell.textContent?.trim() ?? ''))
          .filter(([name]) => name?.startsWith('Vasicek'))
          .map(([, fair]) => fair),
      );
    await page.raw.waitForFunction(
      () =>
        [...document.querySelectorAll('[aria-label="The forward by funding"] tbody th')].filter((name) =>
          name.textContent?.startsWith('Vasicek'),
        ).length === 2,
    );
    const [quoted, kept] = await fairs();
    expect(quoted).not.toBe(kept);
    await person.press('Take out Vasicek');
    await page.raw.waitForFunction(() => !document.body.innerText.includes('Take out Vasicek'));
  });

  test('a future differs from the forward by two causes, where rates are random', async () => {
    await page.press('2');
    await person.press('Futures');
    const ratio = () =>
      page.raw.$$eval('[aria-label="Futures and forwards by maturity"] tr.total td', (cells) => cells[2]?.textContent);
    await page.raw.waitForSelector('[aria-label="Futures and forwards by maturity"] tr.total');
    expect(await ratio()).toBe('1');
    await page.press('1');
    await toRandom(person);
    await page.raw.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
    await page.press('2');
    await page.raw.waitForFunction(
      () =>
        document.querySelector('[aria-label="Futures and forwards by maturity"] tr.total td:nth-of-type(3)')
          ?.textContent !== '1',
    );
    await page.raw.waitForFunction(() =>
      /^EUR\s[+−]/.test(
        document.querySelector('[aria-label="Futures and forwards by maturity"] tr.total td:last-child')?.textContent ??
          '',
      ),
    );
    await person.see('Future less forward, by cause');
    await person.type('Correlation with the short rate', '2');
    await person.see('1');
    await page.raw.waitForSelector('.field-error');
  });

  test('the price by the share hedged: at all of it the forward, whatever the growth', async () => {
    await page.press('2');
    await person.press('Hedge cover');
    await person.see('the price stands between the two worlds');
    const facts = () =>
      page.raw.$$eval('.panels .facts dd b', (found) => found.map((figure) => figure.textContent?.trim() ?? ''));
    await person.type('Hedged', '100');
    await person.see('What anybody thinks of the asset’s growth');
    const [sell, buy, fair] = await facts();
    expect([sell, buy]).toEqual([fair, fair]);
    await person.type('Hedged', '0');
    await person.see('this is an insurer’s price');
    await person.see('Our result a unit when we sell');
    await person.see('Our result a unit when we buy');
    await person.see('We lose, selling');
    await person.see('on 10,000 shares');
    const slider = await page.raw.waitForSelector('[role="slider"][aria-label^="Price to"]');
    await slider?.focus();
    await page.press('End');
    expect(await slider?.evaluate((plot) => plot.getAttribute('aria-valuetext'))).toContain('100');
  });
});
