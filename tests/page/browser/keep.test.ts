import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { TestBrowser, type TestPage } from '../driver/driver';
import { Downloads, Person } from '../driver/person';

describe('what is kept', () => {
  let browser: TestBrowser;
  let page: TestPage;
  let person: Person;
  const downloads = new Downloads();

  beforeAll(async () => {
    browser = await TestBrowser.launch('chromium');
    page = await browser.open(pageFile);
    person = new Person(page);
    await downloads.of(page);
    await person.settled();
  });
  afterAll(async () => {
    downloads.remove();
    await browser?.close();
  });

  const open = async (file: string): Promise<void> => {
    const field = await person.field('File to open');
    await (field as unknown as { uploadFile(path: string): Promise<void> }).uploadFile(file);
  };

  test('what is typed survives closing', async () => {
    const before = await person.prices();
    await person.type('Maturity, a date or a tenor', '18 Jun 27');
    const typed = await person.pricesAfter(before);
    await page.raw.reload();
    expect(await person.settled()).toEqual(typed);
  });

  test('a saved file brings back the same digits', async () => {
    const saved = await person.settled();
    await page.press('Control', 's');
    const file = await downloads.file(page, 'forwright-');
    await person.type('Maturity, a date or a tenor', '3M');
    const other = await person.pricesAfter(saved);
    await open(file);
    expect(await person.pricesAfter(other)).toEqual(saved);
  });

  test('a damaged or foreign file says what is wrong and changes nothing', async () => {
    const before = await person.settled();
    const damaged = join(downloads.folder, 'damaged.txt');
    writeFileSync(damaged, '{"format":"forwright-state/1","draft":');
    await open(damaged);
    await person.see('not JSON');
    const foreign = join(downloads.folder, 'foreign.txt');
    writeFileSync(foreign, '{"format":"forwright-state/1","decimal":".","draft":{"deals":[]}}');
    await open(foreign);
    await person.see('damaged');
    expect(await person.settled()).toEqual(before);
  });

  test('a quote given can be computed again to the same digits', async () => {
    await page.press('Alt', 'g');
    await page.press('Alt', '4');
    await person.press('Same number again');
    await person.see('every digit');
  });

  test('the five places are one key away each', async () => {
    for (const [key, name] of ['Quote', 'Requests', 'Agreed', 'Book', 'Market'].entries()) {
      await page.press('Alt', String(key + 1) as '1');
      await page.raw.waitForFunction(
        (wanted: string) => document.querySelector('.places [aria-current]')?.textContent.includes(wanted),
        {},
        name,
      );
    }
    expect(page.messages).toEqual([]);
  });
});
