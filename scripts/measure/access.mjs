/**
 * `node scripts/measure/access.mjs BASE [PATH …]`: accessibility of pages as they stand. Axe (WCAG 2.2 A and AA) in light, dark and
 * at 320 pixels; then what axe does not look at: reflow, size of targets, visible focus on every Tab stop, running animations under
 * reduced motion. Ends with 1 when anything fails.
 */
import AxeBuilder from '@axe-core/playwright';
import { addresses, freshContext, launch } from './lib/browser.mjs';

const { base, paths } = addresses('Usage: node scripts/measure/access.mjs http://localhost:4321 / /models');
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const MOST_STOPS = 120;
let failed = 0;

function say(path, what, detail, ok) {
  if (!ok) failed++;
  console.log(`${ok ? 'ok  ' : 'FAIL'} ${path}  ${what}  ${detail}`);
}

async function withPage(browser, path, options, look) {
  const context = await freshContext(browser, base, options);
  const page = await context.newPage();
  await page.goto(base + path, { waitUntil: 'networkidle' });
  await look(page);
  await context.close();
}

async function axe(page, path, name) {
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  const text = violations.map(({ id, nodes }) => `${id} at ${nodes[0].target.join(' ')} and ${nodes.length - 1} more`);
  say(path, `axe, ${name}`, text.join('; '), violations.length === 0);
}

/** Things to press that are smaller than 24 pixels; links inside running text are exempt (WCAG 2.5.8). */
function smallTargets() {
  const targets = document.querySelectorAll('a[href], button, input, select, textarea, [role="button"], [role="tab"]');
  return [...targets]
    .filter((target) => {
      const { width, height } = target.getBoundingClientRect();
      const inText = target.tagName === 'A' && getComputedStyle(target).display === 'inline';
      return width > 0 && height > 0 && !inText && (width < 24 || height < 24);
    })
    .map((target) => target.outerHTML.slice(0, 70));
}

function focused() {
  const element = document.activeElement;
  if (!element || element === document.body) return null;
  const style = getComputedStyle(element);
  const outlined = style.outlineStyle !== 'none' && Number.parseFloat(style.outlineWidth) > 0;
  const { x, y } = element.getBoundingClientRect();
  return {
    key: `${element.outerHTML.slice(0, 90)} ${x} ${y + scrollY}`,
    visible: outlined || style.boxShadow !== 'none',
  };
}

async function tabThrough(page, path) {
  const seen = new Set();
  const invisible = [];
  for (let stop = 0; stop < MOST_STOPS; stop++) {
    await page.keyboard.press('Tab');
    const at = await page.evaluate(focused);
    if (!at || seen.has(at.key)) break;
    seen.add(at.key);
    if (!at.visible) invisible.push(at.key);
  }
  say(path, 'visible focus', `${seen.size} stops; ${invisible[0] ?? 'all visible'}`, invisible.length === 0);
}

const browser = await launch();
for (const path of paths) {
  await withPage(browser, path, {}, async (page) => {
    await axe(page, path, 'light');
    const small = await page.evaluate(smallTargets);
    say(path, 'targets of 24 pixels', small[0] ?? '', small.length === 0);
    await tabThrough(page, path);
  });
  await withPage(browser, path, { colorScheme: 'dark' }, (page) => axe(page, path, 'dark'));
  await withPage(browser, path, { viewport: { width: 320, height: 640 } }, async (page) => {
    await axe(page, path, '320 pixels');
    const width = await page.evaluate(() => document.documentElement.scrollWidth);
    say(path, 'reflow at 320 pixels', `${width} wide`, width <= 320);
  });
  await withPage(browser, path, { reducedMotion: 'reduce' }, async (page) => {
    const moving = await page.evaluate(
      () =>
        document
          .getAnimations()
          .filter((one) => one.playState === 'running' && one.effect?.getComputedTiming().duration > 10).length,
    );
    say(path, 'reduced motion', `${moving} running animations`, moving === 0);
  });
}
await browser.close();
process.exit(failed > 0 ? 1 : 0);
