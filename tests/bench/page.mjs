// Measures the built page in Chromium and the module under Node.js; prints JSON, milliseconds.
//
//   node tests/bench/page.mjs <folder of the build> <web folder with its packages>
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';

const [build, web] = process.argv.slice(2).map((path) => resolve(path));
const require = createRequire(join(web, 'package.json'));
const { default: puppeteer } = await import(pathToFileURL(require.resolve('puppeteer-core')).href);
const { openCore } = await import(pathToFileURL(join(web, 'tools/open-core.mjs')).href);

const sorted = (values) => [...values].sort((a, b) => a - b);
const quantile = (values, q) => sorted(values)[Math.min(values.length - 1, Math.floor(q * values.length))];

async function wholeQuote(kind) {
  const core = await openCore(join(build, 'packed'), kind);
  const request = readFileSync(join(web, 'demonstration/share.json'), 'utf8');
  for (let i = 0; i < 300; ++i) core.answer(request);
  const took = Array.from({ length: 500 }, () => {
    const start = performance.now();
    core.answer(request);
    return performance.now() - start;
  });
  return quantile(took, 0.5);
}

const browser = await puppeteer.launch({
  executablePath: process.env.FORWRIGHT_CHROMIUM ?? '/usr/bin/chromium',
  headless: true,
  args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--no-first-run', '--disable-sync'],
});

/** Opens the file and gives the milliseconds from the start of navigation to the first price on screen. */
async function coldStart() {
  const context = await browser.createBrowserContext();
  const page = await context.newPage();
  await page.evaluateOnNewDocument(() => {
    new MutationObserver((_, watching) => {
      if (document.querySelector('.quote[data-stale="false"] .price') === null) return;
      window.firstPrice = performance.now();
      watching.disconnect();
    }).observe(document, { subtree: true, childList: true, attributes: true });
  });
  await page.goto(pathToFileURL(join(build, 'forwright.html')).href);
  await page.waitForFunction(() => window.firstPrice !== undefined);
  const milliseconds = await page.evaluate(() => window.firstPrice);
  return { milliseconds, page };
}

const starts = [];
let page;
for (let i = 0; i < 9; ++i) {
  await page?.close();
  const start = await coldStart();
  starts.push(start.milliseconds);
  ({ page } = start);
}

/**
 * From the input event to the changed price in the document, for a spot typed a hundred times, as quickly as hands type:
 * the next key comes when what follows the price (charts, panels) has been drawn as well.
 */
const betweenKeys = 80;
const latencies = await page.evaluate(async (pause) => {
  document.querySelector('[data-card="spot"] button').click();
  await new Promise((painted) => requestAnimationFrame(painted));
  const field = [...document.querySelectorAll('[data-card="spot"] input')][1];
  const price = () => [...document.querySelectorAll('.quote .price')].map((shown) => shown.textContent).join();
  const took = [];
  for (let i = 0; i < 100; ++i) {
    const before = price();
    const changed = new Promise((done) => {
      const watching = new MutationObserver(() => {
        if (price() === before) return;
        watching.disconnect();
        done(performance.now());
      });
      watching.observe(document.querySelector('.quote'), { subtree: true, childList: true, characterData: true });
    });
    field.value = String(48.7 + (i % 50) / 10);
    const start = performance.now();
    field.dispatchEvent(new InputEvent('input', { bubbles: true }));
    took.push((await changed) - start);
    await new Promise((typed) => setTimeout(typed, pause));
  }
  return took;
}, betweenKeys);
await browser.close();

console.log(
  JSON.stringify({
    'whole quote, module': await wholeQuote('module'),
    'whole quote, plain script': await wholeQuote('plain'),
    'cold start to the first price, median': quantile(starts, 0.5),
    'input to changed price, p95': quantile(latencies, 0.95),
  }),
);
