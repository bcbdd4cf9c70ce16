import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { ElementHandle } from 'puppeteer-core';
import type { TestPage } from './driver';

/** A page as a person uses it: fields by the names they carry, buttons by what they say, prices as they are read. */
export class Person {
  constructor(readonly page: TestPage) {}

  /** What is read as the price of each side, bid first. */
  async prices(): Promise<string[]> {
    await this.page.raw.waitForSelector('.quote .price');
    return this.page.raw.$$eval('.quote .price', (found) => found.map((price) => price.textContent.trim()));
  }

  /** Waits for a quote that stands for what is typed, and gives its prices. */
  async settled(): Promise<string[]> {
    await this.page.raw.waitForSelector('.quote[data-stale="false"] .price');
    return this.prices();
  }

  /** Waits until the prices are others than `before`, and good. */
  async pricesAfter(before: readonly string[]): Promise<string[]> {
    await this.page.raw.waitForFunction(
      (old: string) =>
        document.querySelector('.quote[data-stale="false"]') !== null &&
        [...document.querySelectorAll('.quote .price')].map((price) => price.textContent.trim()).join() !== old,
      {},
      before.join(),
    );
    return this.prices();
  }

  /** The field of that name. */
  async field(name: string): Promise<ElementHandle<HTMLInputElement>> {
    const found = await this.page.raw.waitForFunction(
      (wanted: string) => {
        const named = [...document.querySelectorAll<HTMLElement>('input, select, textarea')].filter((field) => {
          const labels = [...((field as HTMLInputElement).labels ?? [])].map((label) => label.textContent.trim());
          return field.getAttribute('aria-label') === wanted || labels.includes(wanted);
        });
        return named.find((field) => field.checkVisibility()) ?? named[0];
      },
      {},
      name,
    );
    return found as ElementHandle<HTMLInputElement>;
  }

  /** Replaces what stands in the field, key by key. */
  async type(name: string, text: string): Promise<void> {
    const field = await this.field(name);
    await field.evaluate((element) => {
      element.focus();
      element.select();
    });
    await this.page.raw.keyboard.press('Backspace');
    await this.page.raw.keyboard.type(text);
  }

  /** Puts a text in the field in one stroke, as from the clipboard: nothing half typed comes between. */
  async put(name: string, text: string): Promise<void> {
    const field = await this.field(name);
    await field.evaluate((element) => {
      element.focus();
      element.select();
    });
    await this.page.raw.keyboard.sendCharacter(text);
  }

  async choose(name: string, value: string): Promise<void> {
    await (await this.field(name)).select(value);
  }

  /** Presses what says so: a button, a tab, or one of a few choices. */
  async press(text: string): Promise<void> {
    const found = await this.page.raw.waitForFunction(
      (wanted: string) =>
        [...document.querySelectorAll<HTMLElement>('button, [role="tab"], .segmented label')].find(
          (element) => element.checkVisibility() && element.textContent.trim().startsWith(wanted),
        ),
      {},
      text,
    );
    await (found as ElementHandle<HTMLElement>).evaluate((element) => element.click());
  }

  async see(text: string): Promise<void> {
    await this.page.raw.waitForFunction((wanted: string) => document.body.innerText.includes(wanted), {}, text);
  }

  /** Pastes into the field of that name, as from a spreadsheet. */
  async paste(name: string, text: string): Promise<void> {
    const field = await this.field(name);
    await field.evaluate((element, pasted) => {
      const clipboardData = new DataTransfer();
      clipboardData.setData('text/plain', pasted);
      element.focus();
      element.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
    }, text);
  }
}

/** A folder that Chromium puts a page's downloads in. */
export class Downloads {
  readonly folder = mkdtempSync(join(tmpdir(), 'forwright-downloads-'));

  async of(page: TestPage): Promise<void> {
    const session = await page.raw.createCDPSession();
    await session.send('Browser.setDownloadBehavior', { behavior: 'allow', downloadPath: this.folder });
  }

  /** Waits for a finished file whose name begins so; its path. */
  async file(page: TestPage, beginning: string): Promise<string> {
    for (;;) {
      const name = readdirSync(this.folder).find((found) => found.startsWith(beginning) && found.endsWith('.json'));
      if (name !== undefined && readFileSync(join(this.folder, name)).length > 0) return join(this.folder, name);
      await page.nextFrame();
    }
  }

  remove(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}
