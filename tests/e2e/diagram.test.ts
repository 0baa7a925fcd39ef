import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { faults, overflows, PHONE, raise, type Stage } from './harness.ts';

let stage: Stage;
let bubble = '';
let list = '';
beforeAll(async () => {
  stage = await raise();
  const page = await stage.open('/expansions');
  list = (await page.getByRole('link', { name: 'h h → s s at one loop' }).first().getAttribute('href'))!;
  await page.goto(list);
  bubble = (await page.locator('a.fig').first().getAttribute('href'))!;
  await page.context().close();
});
afterAll(() => stage?.close());

describe('one diagram', () => {
  it('without JavaScript: drawn with numbers, its factor by two routes that agree, its neighbours', async () => {
    const page = await stage.open(bubble, { javaScriptEnabled: false });
    // The bubble with two equal lines: S = 2 (common practice).
    expect(await page.locator('.diagram-facts dd').first().textContent()).toBe('2');
    expect(await page.locator('[data-vertex]').count()).toBe(2);
    expect(await page.locator('[data-line]').count()).toBe(2);
    expect(await page.locator('.vertex-number').allTextContents()).toHaveLength(2);
    expect(await page.locator('#working ~ *').first().textContent()).toContain('1/S');
    await page.getByText('The two routes agree.').waitFor();
    await page.getByRole('link', { name: 'Next' }).click();
    expect(await page.getByRole('heading', { level: 1 }).textContent()).toMatch(/Diagram 2\s+of 4/);
    await page.getByRole('link', { name: 'Previous' }).click();
    expect(new URL(page.url()).pathname).toBe(bubble);
  });

  it('marks on the drawing what a generator moves, while it has the focus and when it is pressed', async () => {
    const page = await stage.open(bubble);
    const generator = page.locator('button[data-generator]').first();
    await generator.focus();
    // Exchanging the two lines moves both of them and neither vertex.
    expect(await page.locator('.moved[data-line]').count()).toBe(2);
    expect(await page.locator('.moved[data-vertex]').count()).toBe(0);
    await page.keyboard.press('Enter');
    expect(await generator.getAttribute('aria-pressed')).toBe('true');
    await generator.blur();
    expect(await page.locator('.moved').count()).toBe(2);
    await generator.click();
    expect(await generator.getAttribute('aria-pressed')).toBe('false');
  });

  it('has a drawing to take away', async () => {
    const page = await stage.open(bubble);
    const reply = await page.request.get((await page.getByRole('link', { name: 'SVG' }).getAttribute('href'))!);
    expect(reply.headers()['content-type']).toContain('image/svg+xml');
    expect(await reply.text()).toContain('<path');
  });

  it('ships at most 10 KiB of scripts', async () => {
    const page = await stage.open(bubble);
    await page.waitForLoadState('networkidle');
    const bytes = await page.evaluate(() =>
      performance
        .getEntriesByType('resource')
        .filter(({ name }) => new URL(name).pathname.endsWith('.js'))
        .reduce((sum, entry) => sum + (entry as PerformanceResourceTiming).encodedBodySize, 0),
    );
    expect(bytes).toBeGreaterThan(0);
    expect(bytes).toBeLessThanOrEqual(10 * 1024);
  });

  it.each(['light', 'dark'] as const)('has no accessibility fault in %s, and fits a phone', async (colorScheme) => {
    const page = await stage.open(bubble, { ...PHONE, colorScheme });
    expect([await faults(page), await overflows(page)]).toEqual([[], false]);
  });

  it('a label that is none is a page that says so', async () => {
    const page = await stage.open(`${list}/diagrams/w1.none`);
    expect(await page.locator('[data-diagram]').count()).toBe(0);
    expect(await page.getByRole('heading', { level: 1 }).count()).toBe(1);
  });

  it('writes no error to the console', () => {
    expect(stage.errors.filter((line) => !/status of 404/.test(line))).toEqual([]);
  });
});
