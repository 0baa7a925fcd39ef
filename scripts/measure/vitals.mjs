/**
 * `node scripts/measure/vitals.mjs BASE [PATH …]`: how a page loads in a fresh browser, median of RUNS (5) loads.
 * Prints time to first byte, first and largest paint, layout shift, blocking time, bytes by kind, elements, console errors.
 * CPU=4 slows the processor down four times.
 */
import { addresses, freshContext, launch, median } from './lib/browser.mjs';

const { base, paths } = addresses('Usage: node scripts/measure/vitals.mjs http://localhost:4321 / /models');
const runs = Number(process.env.RUNS ?? 5);
const slowdown = Number(process.env.CPU ?? 1);

/** Runs in the page before anything else. */
function observe() {
  const seen = { lcp: 0, cls: 0, blocking: 0 };
  window.__seen = seen;
  const on = (type, read) =>
    new PerformanceObserver((list) => list.getEntries().forEach(read)).observe({ type, buffered: true });
  on('largest-contentful-paint', (entry) => {
    seen.lcp = entry.startTime;
  });
  on('layout-shift', (entry) => {
    if (!entry.hadRecentInput) seen.cls += entry.value;
  });
  on('longtask', (entry) => {
    seen.blocking += Math.max(0, entry.duration - 50);
  });
}

async function load(browser, path) {
  const context = await freshContext(browser, base);
  const page = await context.newPage();
  const network = await context.newCDPSession(page);
  const kinds = new Map();
  const bytes = {};
  let errors = 0;
  page.on('pageerror', () => errors++);
  page.on('console', (message) => message.type() === 'error' && errors++);
  network.on('Network.responseReceived', ({ requestId, type }) => kinds.set(requestId, type));
  network.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    const kind = kinds.get(requestId) ?? 'Other';
    bytes[kind] = (bytes[kind] ?? 0) + encodedDataLength;
  });
  await network.send('Network.enable');
  if (slowdown > 1) await network.send('Emulation.setCPUThrottlingRate', { rate: slowdown });
  await page.addInitScript(observe);
  await page.goto(base + path, { waitUntil: 'networkidle' });
  const timing = await page.evaluate(() => {
    const [navigation] = performance.getEntriesByType('navigation');
    const [paint] = performance.getEntriesByName('first-contentful-paint');
    return {
      ...window.__seen,
      ttfb: navigation.responseStart - navigation.requestStart,
      fcp: paint?.startTime ?? 0,
      elements: document.querySelectorAll('*').length,
    };
  });
  await context.close();
  return { ...timing, js: bytes.Script ?? 0, css: bytes.Stylesheet ?? 0, html: bytes.Document ?? 0, errors };
}

const browser = await launch();
for (const path of paths) {
  const rows = [];
  for (let run = 0; run < runs; run++) rows.push(await load(browser, path));
  const of = (key) => median(rows.map((row) => row[key]));
  const kib = (key) => (of(key) / 1024).toFixed(1);
  console.log(
    `${path}  ttfb ${of('ttfb').toFixed(0)} ms  fcp ${of('fcp').toFixed(0)} ms  lcp ${of('lcp').toFixed(0)} ms  cls ${of('cls').toFixed(3)}  blocking ${of('blocking').toFixed(0)} ms  js ${kib('js')} KiB  css ${kib('css')} KiB  html ${kib('html')} KiB  elements ${of('elements')}  console errors ${Math.max(...rows.map((row) => row.errors))}`,
  );
}
await browser.close();
