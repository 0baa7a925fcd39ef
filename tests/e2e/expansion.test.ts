import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { alive, faults, overflows, PHONE, raise, type Stage } from './harness.ts';

let stage: Stage;
let portal = '';
let vacuum = '';
beforeAll(async () => {
  stage = await raise();
  const page = await stage.open('/expansions');
  const addressOf = async (name: string) => (await page.getByRole('link', { name }).first().getAttribute('href'))!;
  portal = await addressOf('h h → s s at one loop');
  vacuum = await addressOf('Vacuum diagrams through λ⁴');
  await page.context().close();
});
afterAll(() => stage?.close());

const canvasReady = (page: Page) =>
  page.locator('.canvas[data-ready="true"] .react-flow__node-diagram').first().waitFor();
const scriptBytes = (page: Page): Promise<number> =>
  page.evaluate(() =>
    performance
      .getEntriesByType('resource')
      .filter(({ name }) => new URL(name).pathname.endsWith('.js'))
      .reduce((sum, entry) => sum + (entry as PerformanceResourceTiming).encodedBodySize, 0),
  );

describe('without JavaScript', () => {
  it('shows the proof, the plates with their drawings, and the way to each diagram', async () => {
    const page = await stage.open(portal, { javaScriptEnabled: false });
    // ⟨h h s s⟩ at one loop, 1PI: two bubbles in the s-channel with S = 2, t and u with S = 1; Σ 1/S = 3 (counted by hand).
    expect(await page.locator('.led').textContent()).toMatch(/4 diagrams.*3.*from the list.*3.*balanced/s);
    expect(await page.locator('a.fig svg path').count()).toBeGreaterThan(8);
    expect(await page.locator('a.fig').count()).toBe(4);
    expect(await page.locator('#ledger tbody tr').count()).toBe(4);
    await page.locator('a.fig').first().click();
    expect(new URL(page.url()).pathname).toMatch(new RegExp(`^${portal}/diagrams/w1`));
  });

  it('finds, filters and sorts by a plain form, and says when nothing fits', async () => {
    const page = await stage.open(portal, { javaScriptEnabled: false });
    await page.getByLabel('Find').fill('S=2');
    await page.getByRole('button', { name: 'Show as a list' }).click();
    expect(await page.locator('[data-server-plates] tbody tr').count()).toBe(2);
    await page.goto(`${portal}?tadpole=true`);
    expect(await page.locator('[data-server-plates]').textContent()).toContain('No diagram of this list fits');
  });

  it('groups by loops: all four stand on one plate', async () => {
    const page = await stage.open(`${portal}?by=loops`, { javaScriptEnabled: false });
    expect(await page.locator('.result-plates .plate').count()).toBe(1);
  });
});

describe('the canvas', () => {
  it('holds every diagram in its plate, within the elements that pan smoothly', async () => {
    const page = await stage.open(portal);
    await canvasReady(page);
    expect(await page.locator('.react-flow__node-diagram').count()).toBe(4);
    expect(await page.locator('.react-flow__node-plate').count()).toBe(3);
    const elements = await page
      .locator('.react-flow__node-diagram')
      .evaluateAll((nodes) => nodes.map((node) => node.querySelectorAll('*').length));
    expect(Math.max(...elements)).toBeLessThanOrEqual(8);
  });

  it('is walked by arrow keys and opened by Enter', async () => {
    const page = await stage.open(portal);
    await canvasReady(page);
    await page.locator('.canvas').focus();
    await page.keyboard.press('ArrowRight');
    await page.getByText(/^Diagram 1, S = /).waitFor();
    await page.keyboard.press('ArrowRight');
    await page.getByText(/^Diagram 2, S = /).waitFor();
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/diagrams\/w1/);
    expect(await page.getByRole('heading', { level: 1 }).textContent()).toContain('Diagram 2');
  });

  it('finds by factor and dims the rest', async () => {
    const page = await stage.open(portal);
    await canvasReady(page);
    await page.getByLabel('Find on the canvas').fill('S=2');
    await page.getByText('2 found').waitFor();
    expect(await page.locator('.react-flow__node-diagram.dim').count()).toBe(2);
  });

  it('offers what can be done with a diagram where it is pointed at', async () => {
    const page = await stage.open(portal);
    await canvasReady(page);
    await page.locator('.react-flow__node-diagram').nth(2).click({ button: 'right' });
    const open = page.getByRole('menuitem', { name: /Open diagram \d/ });
    await open.waitFor();
    expect(await open.evaluate((link) => link === document.activeElement)).toBe(true);
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/diagrams\/w1/);
  });
});

describe('the table', () => {
  it('finds, filters and sorts on the server, and says when nothing fits', async () => {
    const page = await stage.open(vacuum);
    await alive(page);
    await page.getByRole('button', { name: 'Table' }).click();
    await page.locator('.grid-body tr').nth(3).waitFor();
    await page.getByRole('columnheader', { name: 'S', exact: true }).getByRole('button').click();
    const head = page.locator('th[aria-sort="ascending"]', { hasText: 'S' });
    await head.waitFor();
    await page.locator('.explorer-filters').getByLabel('1PI').selectOption('false');
    await page.waitForFunction(() =>
      /^\d+ diagrams$/.test(document.querySelector('.explorer-filters [role=status]')?.textContent ?? ''),
    );
    await page.getByLabel('Find in the list').fill('S=9999991');
    await page.getByText('No diagram fits.').waitFor();
    expect(await page.locator('.grid-body tr').count()).toBe(0);
  });

  it('stays within its weight, before and after it opens', async () => {
    const page = await stage.open(portal);
    await canvasReady(page);
    const before = await scriptBytes(page);
    expect(before).toBeGreaterThan(50 * 1024);
    expect(before).toBeLessThan(125 * 1024);
    await page.getByRole('button', { name: 'Table' }).click();
    await page.locator('.grid-body tr').first().waitFor();
    expect(await scriptBytes(page)).toBeGreaterThan(before);
    expect(await scriptBytes(page)).toBeLessThan(155 * 1024);
  });
});

describe('every view', () => {
  it.each(['light', 'dark'] as const)('has no accessibility fault in %s, and fits a phone', async (colorScheme) => {
    for (const view of ['Canvas', 'Plates', 'Table']) {
      const page = await stage.open(portal, { ...PHONE, colorScheme });
      await alive(page);
      await page.getByRole('button', { name: view, exact: true }).click();
      if (view === 'Canvas') await canvasReady(page);
      if (view === 'Table') await page.locator('.grid-body tr').first().waitFor();
      expect([view, await faults(page), await overflows(page)]).toEqual([view, [], false]);
      await page.context().close();
    }
  });

  it('an address that is none is a page that says so', async () => {
    const page = await stage.open('/expansions/000000000000000000000000');
    expect(await page.getByRole('heading', { level: 1 }).count()).toBe(1);
    expect(await faults(page)).toEqual([]);
  });

  it('writes no error to the console', () => {
    expect(stage.errors.filter((line) => !/status of 4\d\d/.test(line))).toEqual([]);
  });
});
