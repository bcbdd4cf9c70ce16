import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pageFile } from '../driver/built';
import { everyBrowser, TestBrowser, type TestPage } from '../driver/driver';

describe.each(everyBrowser)('the file opened from the disk in %s', (name) => {
  let browser: TestBrowser;
  let page: TestPage;

  beforeAll(async () => {
    browser = await TestBrowser.launch(name);
    page = await browser.open(pageFile);
  });
  afterAll(() => browser?.close());

  test('is the page', async () => {
    expect(await page.raw.title()).toContain('Forwright');
  });

  test('has WebAssembly unless the browser is hardened', async () => {
    const has = await page.raw.evaluate(() => typeof WebAssembly === 'object');
    expect(has).toBe(name !== 'hardened chromium');
  });

  test('refuses to load anything from elsewhere', async () => {
    const loaded = await page.raw.evaluate(() =>
      fetch('https://192.0.2.1/').then(
        () => 'loaded',
        () => 'refused',
      ),
    );
    expect(loaded).toBe('refused');
    const policy = await page.raw.$eval('meta[http-equiv]', (meta) => meta.getAttribute('content'));
    expect(policy).toContain("default-src 'none'");
  });
});
