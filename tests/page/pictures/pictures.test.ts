import { mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { resolve } from 'node:path';
import { expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { TestBrowser } from '../driver/driver';
import { Person } from '../driver/person';

const folder = fileURLToPath(new URL('../../../web/pictures', import.meta.url));

/** The pictures of the README, from the page as it runs. */
test('the pictures of the README', { timeout: 60_000 }, async () => {
  mkdirSync(folder, { recursive: true });
  const browser = await TestBrowser.launch('chromium');
  for (const [width, height] of [
    [1440, 1120],
    [768, 1100],
    [360, 780],
  ] as const) {
    for (const scheme of ['light', 'dark']) {
      const page = await browser.open(pageFile, { width, height });
      await page.raw.emulateMediaFeatures([{ name: 'prefers-color-scheme', value: scheme }]);
      await new Person(page).settled();
      await page.raw.waitForSelector('[role="slider"]');
      await page.nextFrame();
      await page.raw.screenshot({ path: resolve(folder, `quote-${String(width)}-${scheme}.png`) as `${string}.png` });
      expect(page.messages).toEqual([]);
      await page.close();
    }
  }
  await browser.close();
});
