import { pathToFileURL } from 'node:url';
import puppeteer, { type Browser, type KeyInput, type LaunchOptions, type Page } from 'puppeteer-core';

/** The browsers that the page is tested in. The hardened one has no WebAssembly, as company policy may have it. */
export type BrowserName = 'chromium' | 'firefox' | 'hardened chromium';
export const everyBrowser: readonly BrowserName[] = ['chromium', 'firefox', 'hardened chromium'];

/** What Chromium and Firefox ask for on their own behalf, however quiet they are told to be: never resolved here. */
const chromiumsOwnHosts = ['clients2.google.com', 'update.googleapis.com'];
const firefoxsOwnHosts = ['firefox.settings.services.mozilla.com'];

const chromiumArguments = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-dev-shm-usage',
  `--host-resolver-rules=${chromiumsOwnHosts.map((host) => `MAP ${host} ~NOTFOUND`).join(',')}`,
];

/** What Firefox would fetch by itself, switched off, and one origin for each path, as it is for a person. */
const firefoxPreferences = {
  'security.fileuri.strict_origin_policy': true,
  'network.captive-portal-service.enabled': false,
  'network.connectivity-service.enabled': false,
  'network.dns.disablePrefetch': true,
  'network.trr.mode': 5,
  'network.dns.localDomains': firefoxsOwnHosts.join(','),
  'app.normandy.enabled': false,
  'extensions.getAddons.cache.enabled': false,
  'extensions.systemAddon.update.enabled': false,
  'browser.safebrowsing.update.enabled': false,
  'browser.region.update.enabled': false,
  'media.gmp-manager.updateEnabled': false,
};

function launchOptions(name: BrowserName): LaunchOptions {
  if (name === 'firefox') {
    return {
      browser: 'firefox',
      executablePath: process.env.FORWRIGHT_FIREFOX ?? '/usr/bin/firefox-esr',
      extraPrefsFirefox: firefoxPreferences,
    };
  }
  const hardening = name === 'hardened chromium' ? ['--js-flags=--jitless'] : [];
  return {
    browser: 'chrome',
    executablePath: process.env.FORWRIGHT_CHROMIUM ?? '/usr/bin/chromium',
    args: [...chromiumArguments, ...hardening],
    pipe: true,
  };
}

/** A browser with an empty profile of its own. */
export class TestBrowser {
  static async launch(name: BrowserName): Promise<TestBrowser> {
    return new TestBrowser(name, await puppeteer.launch({ headless: true, ...launchOptions(name) }));
  }

  private constructor(
    readonly name: BrowserName,
    private readonly browser: Browser,
  ) {}

  /** Opens a file from the disk in a tab of its own, as a double click would. */
  async open(file: string, viewport = { width: 1280, height: 900 }): Promise<TestPage> {
    const page = await this.browser.newPage();
    await page.setViewport(viewport);
    const messages: string[] = [];
    page.on('console', (message) => messages.push(`${message.type()}: ${message.text()}`));
    page.on('pageerror', (error) => messages.push(`uncaught: ${String(error)}`));
    await page.goto(pathToFileURL(file).href, { waitUntil: 'load' });
    return new TestPage(page, messages);
  }

  version(): Promise<string> {
    return this.browser.version();
  }

  async close(): Promise<void> {
    await this.browser.close();
  }
}

/** One tab. `raw` is there for what only one test needs. */
export class TestPage {
  constructor(
    readonly raw: Page,
    /** Everything the console was told, and every error that nothing caught, in order. */
    readonly messages: readonly string[],
  ) {}

  /** The text of the one element that the selector names, as soon as it is there. */
  async text(selector: string): Promise<string> {
    const element = await this.raw.waitForSelector(selector);
    return (await element!.evaluate((found) => found.textContent ?? '')).trim();
  }

  /** Waits until the element's text is what is looked for; the error tells what it was instead. */
  async untilText(selector: string, wanted: (text: string) => boolean, milliseconds = 10_000): Promise<string> {
    const deadline = Date.now() + milliseconds;
    for (;;) {
      const text = await this.text(selector);
      if (wanted(text)) return text;
      if (Date.now() > deadline) throw new Error(`${selector} still reads: ${text}`);
      await this.nextFrame();
    }
  }

  /** Replaces what stands in a field, key by key. */
  async type(selector: string, text: string): Promise<void> {
    const field = await this.raw.waitForSelector(selector);
    await field!.focus();
    await field!.evaluate((element) => (element as HTMLInputElement).select());
    await this.raw.keyboard.press('Backspace');
    await this.raw.keyboard.type(text);
  }

  /** Presses keys together, the last one while the others are held: `press("Control", "Enter")`. */
  async press(...keys: KeyInput[]): Promise<void> {
    const held = keys.slice(0, -1);
    for (const key of held) await this.raw.keyboard.down(key);
    await this.raw.keyboard.press(keys.at(-1)!);
    for (const key of held.reverse()) await this.raw.keyboard.up(key);
  }

  async nextFrame(): Promise<void> {
    await this.raw.evaluate(() => new Promise((painted) => requestAnimationFrame(() => painted(undefined))));
  }

  async screenshot(file: string): Promise<void> {
    await this.raw.screenshot({ path: file as `${string}.png`, fullPage: true });
  }

  async pdf(file: string): Promise<void> {
    await this.raw.pdf({ path: file, format: 'A4', printBackground: true });
  }

  async close(): Promise<void> {
    await this.raw.close();
  }
}
