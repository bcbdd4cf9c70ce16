import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { everyBrowser, TestBrowser, type TestPage } from '../driver/driver';
import { Person } from '../driver/person';

const seen = new Map<string, string>();

describe.each(everyBrowser)('the same numbers in %s', (name) => {
  let browser: TestBrowser;
  let page: TestPage;
  let person: Person;

  beforeAll(async () => {
    browser = await TestBrowser.launch(name);
    page = await browser.open(pageFile);
    person = new Person(page);
  });
  afterAll(() => browser?.close());

  /** Every browser must read what the first one did. */
  const same = (what: string, figures: readonly string[]): void => {
    const first = seen.get(what) ?? figures.join();
    seen.set(what, first);
    expect(figures.join(), what).toBe(first);
  };

  test('the demonstration, another maturity, a flat and a random rate', async () => {
    same('demonstration', await person.settled());
    let before = await person.prices();
    await person.type('Maturity, a date or a tenor', '18 Jun 27');
    before = await person.pricesAfter(before);
    same('another maturity', before);
    await person.press('Funding');
    await person.press('Flat');
    before = await person.pricesAfter(before);
    same('a flat rate', before);
    await person.press('Random');
    before = await person.pricesAfter(before);
    same('a random rate', before);
    await person.type('Volatility', '2.5');
    same('another volatility', await person.settled());
  });

  test('wrong input and its mending', async () => {
    const before = await person.settled();
    await person.type('Quantity', '-5');
    await page.raw.waitForSelector('.quote[data-stale="true"]');
    await page.raw.waitForSelector('.field-error');
    await person.type('Quantity', '10k');
    expect(await person.settled()).toEqual(before);
  });

  test('nothing is said on the console', () => {
    expect(page.messages).toEqual([]);
  });
});
