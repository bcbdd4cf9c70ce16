import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { TestBrowser, type TestPage } from '../driver/driver';
import { Person } from '../driver/person';

interface Axe {
  run(options: object): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }>;
}
const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

describe('for everyone', () => {
  let browser: TestBrowser;
  let page: TestPage;
  let person: Person;

  beforeAll(async () => {
    browser = await TestBrowser.launch('chromium');
    page = await browser.open(pageFile);
    person = new Person(page);
    await person.settled();
    await page.raw.evaluate(axeSource);
  });
  afterAll(() => browser?.close());

  describe.each(['light', 'dark'])('in the %s', (scheme) => {
    test('every place and panel is free of what axe-core finds', async () => {
      await page.raw.emulateMediaFeatures([{ name: 'prefers-color-scheme', value: scheme }]);
      const look = async (where: string): Promise<void> => {
        const found = await page.raw.evaluate(async () => {
          const { axe } = window as unknown as { axe: Axe };
          const { violations } = await axe.run({ resultTypes: ['violations'] });
          return violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ''}`);
        });
        expect(found, where).toEqual([]);
      };
      await page.press('Alt', '1');
      for (const panel of ['Working', 'Ledger', 'Income', 'Sensitivities', 'Random discount']) {
        await page.raw.evaluate((name: string) => {
          [...document.querySelectorAll<HTMLElement>('[role="tab"]')]
            .find((tab) => tab.textContent.trim() === name)
            ?.click();
        }, panel);
        await page.nextFrame();
        await look(panel);
      }
      for (const key of ['2', '3', '4', '5'] as const) {
        await page.press('Alt', key);
        await page.nextFrame();
        await look(`place ${key}`);
      }
      await page.press('Alt', '1');
    });
  });

  test.each([320, 360, 768, 1440])('at %d pixels nothing runs out sideways', async (width) => {
    await page.raw.setViewport({ width, height: 900 });
    for (const key of ['1', '2', '3', '4', '5'] as const) {
      await page.press('Alt', key);
      await page.nextFrame();
      const over = await page.raw.evaluate(() => document.documentElement.scrollWidth - innerWidth);
      expect(over, `place ${key}`).toBeLessThanOrEqual(0);
    }
    await page.press('Alt', '1');
  });

  test('forced colours keep both prices in sight', async () => {
    await page.raw.setViewport({ width: 1280, height: 900 });
    const session = await page.raw.createCDPSession();
    await session.send('Emulation.setEmulatedMedia', { features: [{ name: 'forced-colors', value: 'active' }] });
    expect(await person.prices()).toHaveLength(2);
    await session.send('Emulation.setEmulatedMedia', { features: [] });
  });

  test('the paper says the price, what it rests on and the cautions; the client’s copy has no margin', async () => {
    const [bid, offer] = await person.settled();
    const folder = mkdtempSync(join(tmpdir(), 'forwright-paper-'));
    const print = async (name: string): Promise<string> => {
      const file = join(folder, `${name}.pdf`);
      await page.pdf(file);
      return execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' });
    };
    const client = await print('client');
    for (const said of [bid, offer, 'Brackwater Mills', 'Indicative', 'not an offer', 'advice', 'credit']) {
      expect(client).toContain(said);
    }
    expect(client).not.toMatch(/break-even/i);
    await page.press('Control', 'p');
    await person.press('For the desk');
    await person.press('Cancel');
    const desk = await print('desk');
    rmSync(folder, { recursive: true, force: true });
    expect(desk).toMatch(/break-even/i);
    expect(desk).toMatch(/margin/i);
  });

  test('the chart’s values are in reach of the keyboard', async () => {
    await page.raw.waitForSelector('[role="slider"]');
    await page.raw.focus('[role="slider"]');
    const read = (): Promise<string | null> =>
      page.raw.$eval('[role="slider"]', (slider) => slider.getAttribute('aria-valuetext'));
    const before = await read();
    await page.press('ArrowLeft');
    await page.nextFrame();
    expect(await read()).not.toBe(before);
    expect(page.messages).toEqual([]);
  });
});
