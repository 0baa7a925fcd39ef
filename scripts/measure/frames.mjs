/**
 * `node scripts/measure/frames.mjs URL pan|zoom|scroll|type SELECTOR`: frame rate during a gesture of 2.5 s on an element, as a
 * ratio to the rate of a blank page in the same browser, and the slowest reaction to input. Below 57 frames on the blank page the
 * machine is too busy: run again.
 */
import { freshContext, launch } from './lib/browser.mjs';

const [url, gesture, selector] = process.argv.slice(2);
if (!selector) {
  console.error('Usage: node scripts/measure/frames.mjs URL pan|zoom|scroll|type SELECTOR');
  process.exit(2);
}
const STEPS = 60;
const STEP_MS = 30;

function prepare() {
  window.__slow = [];
  new PerformanceObserver((list) => {
    for (const entry of list.getEntries()) if (entry.interactionId) window.__slow.push(entry.duration);
  }).observe({ type: 'event', durationThreshold: 16, buffered: true });
  window.__frames = (milliseconds) =>
    new Promise((done) => {
      const started = performance.now();
      let count = 0;
      let longest = 0;
      let last = started;
      const frame = () => {
        const now = performance.now();
        count++;
        longest = Math.max(longest, now - last);
        last = now;
        if (now - started < milliseconds) requestAnimationFrame(frame);
        else done({ rate: (count / (now - started)) * 1000, longest });
      };
      requestAnimationFrame(frame);
    });
}

async function perform(page, { x, y }) {
  if (gesture === 'pan') await page.mouse.down();
  if (gesture === 'type') await page.click(selector);
  const text = process.env.TEXT ?? ' + 1/2 m^2 phi^2 + lambda/4! phi^4';
  for (let step = 0; step < STEPS; step++) {
    if (gesture === 'pan') await page.mouse.move(x + Math.sin(step / 5) * 250, y + Math.cos(step / 5) * 150);
    else if (gesture === 'zoom') await page.mouse.wheel(0, step % 30 < 15 ? -60 : 60);
    else if (gesture === 'scroll') await page.mouse.wheel(0, 240);
    else await page.keyboard.type(text[step % text.length]);
    await page.waitForTimeout(STEP_MS);
  }
  if (gesture === 'pan') await page.mouse.up();
}

const browser = await launch();
const context = await freshContext(browser, new URL(url).origin);
await context.addInitScript(prepare);
const page = await context.newPage();
await page.goto('data:text/html,<title>blank</title>');
const blank = await page.evaluate('__frames(1200)');
await page.goto(url, { waitUntil: 'networkidle' });
await page.waitForSelector(selector);
const box = await page.locator(selector).first().boundingBox();
const centre = { x: box.x + box.width / 2, y: box.y + Math.min(box.height / 2, 380) };
await page.mouse.move(centre.x, centre.y);
const measured = page.evaluate('__frames(2500)');
await perform(page, centre);
const { rate, longest } = await measured;
const slowest = Math.max(0, ...(await page.evaluate('__slow')));
console.log(
  `${gesture}: ${rate.toFixed(1)} frames a second, ${(rate / blank.rate).toFixed(2)} of the blank page's ${blank.rate.toFixed(1)}; longest frame ${longest.toFixed(0)} ms; slowest reaction ${slowest > 0 ? `${slowest} ms` : 'under 16 ms'}`,
);
await browser.close();
