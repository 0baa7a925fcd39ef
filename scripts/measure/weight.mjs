/**
 * `node scripts/measure/weight.mjs BASE [PATH …]`: scripts that a page of a running built server loads, as they travel
 * (Brotli), in KiB. On a result page also after the canvas, and after the table was opened on top of it.
 */
import { addresses, freshContext, launch } from './lib/browser.mjs';

const { base, paths } = addresses('Usage: node scripts/measure/weight.mjs http://localhost:4321 /expansions/…');
/** Buttons of a result page, with what stands there once their view has come. */
const VIEWS = { Canvas: '.canvas[data-ready="true"]', Table: '.grid-body tr' };

/** Encoded bytes of all scripts so far, modules fetched on demand included. */
const scriptBytes = (page) =>
  page.evaluate(() =>
    performance
      .getEntriesByType('resource')
      .filter(({ name }) => new URL(name).pathname.endsWith('.js'))
      .reduce((sum, { encodedBodySize }) => sum + encodedBodySize, 0),
  );

const kib = (bytes) => `${(bytes / 1024).toFixed(1)} KiB`;

async function weigh(browser, path) {
  const context = await freshContext(browser, base);
  // On a narrow screen a result opens with its plates: what the page needs by itself is seen first.
  const page = await context.newPage();
  await page.setViewportSize({ width: 600, height: 800 });
  await page.goto(base + path, { waitUntil: 'networkidle' });
  const parts = [`page ${kib(await scriptBytes(page))}`];
  for (const [view, shown] of Object.entries(VIEWS)) {
    const button = page.getByRole('button', { name: view, exact: true });
    if ((await button.count()) === 0) continue;
    await button.click();
    await page.locator(shown).first().waitFor();
    parts.push(`with ${view.toLowerCase()} ${kib(await scriptBytes(page))}`);
  }
  await context.close();
  return parts.join('  ');
}

const browser = await launch();
for (const path of paths) console.log(`${path}  ${await weigh(browser, path)}`);
await browser.close();
