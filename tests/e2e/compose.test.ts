import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { alive, faults, overflows, PHONE, raise, type Stage } from './harness.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await raise();
});
afterAll(() => stage?.close());

const PORTAL = '1/2 (d h)^2 - 1/2 m^2 h^2 + 1/2 (d s)^2 - 1/2 M^2 s^2 - lambda/4! h^4 - rho/4 h^2 s^2 - sigma/4! s^4';
const typed = (query: string, lagrangian = PORTAL) =>
  `/expansions/new?input=${encodeURIComponent(JSON.stringify({ lagrangian }))}&${query}`;

const countOf = (page: Page) => page.locator('.expected-count');
/** Where an expansion has been made: its own page. */
const MADE = /\/expansions\/([0-9a-z]{24})$/;

describe('composing', () => {
  it('goes from a typed Lagrangian to an expansion by keyboard alone, as a visitor', async () => {
    const page = await stage.open('/expansions/new');
    await alive(page);
    await page.getByRole('textbox', { name: 'Lagrangian' }).focus();
    await page.keyboard.insertText(PORTAL);
    const addH = page.getByRole('button', { name: 'Add h' });
    const addS = page.getByRole('button', { name: 'Add s' });
    for (const button of [addH, addH, addS, addS]) {
      await button.focus();
      await page.keyboard.press('Enter');
    }
    expect(await page.getByLabel('Field operators, in order').inputValue()).toBe('h h s s');
    // ⟨h h s s⟩ at one loop, 1PI: λρ and ρσ in the s-channel, ρ² in t and u (counted by hand).
    await page.locator('.expected-count', { hasText: /^4 diagrams$/ }).waitFor();
    await page.getByRole('button', { name: 'Expand' }).focus();
    await page.keyboard.press('Enter');
    await page.waitForURL(MADE);
    await page.goto('/expansions');
    expect(await page.getByRole('region', { name: 'Yours' }).getByRole('link').first().textContent()).toContain(
      'h h s s',
    );
  });

  it('moves and removes legs by keys, and keeps the question in the address', async () => {
    const page = await stage.open(typed('legs=h+s+h+s&by=loops&loops=1&keep=1PI'));
    await alive(page);
    const text = page.getByLabel('Field operators, in order');
    await page.getByRole('button', { name: 'Leg 2, s' }).focus();
    await page.keyboard.press('Shift+ArrowRight');
    expect(await text.inputValue()).toBe('h h s s');
    await page.keyboard.press('Delete');
    expect(await text.inputValue()).toBe('h h s');
    await page.keyboard.press('ArrowLeft');
    await page.waitForFunction(() => document.activeElement?.getAttribute('aria-label') === 'Leg 2, h');
    await page.getByText('Every vertex holds an even number of s').waitFor();
    await page.waitForFunction(() => new URL(location.href).searchParams.get('legs') === 'h h s');
    await page.reload();
    expect(await text.inputValue()).toBe('h h s');
  });

  it('shows each refusal at the field it concerns, and sends nothing that is refused', async () => {
    const page = await stage.open(typed('legs=h+q&by=loops&loops=1&keep=1PI'));
    await alive(page);
    const legs = page.getByLabel('Field operators, in order');
    expect(await page.locator('#legs-error').textContent()).toContain('q');
    await page.getByRole('button', { name: 'Expand' }).focus();
    await page.keyboard.press('Enter');
    expect(await legs.evaluate((input) => input === document.activeElement)).toBe(true);
    expect(new URL(page.url()).pathname).toBe('/expansions/new');
    await legs.fill('h h');
    await page.locator('#legs-error').waitFor({ state: 'detached' });
    await page.getByRole('textbox', { name: 'Number of loops' }).fill('many');
    await page.locator('#order-error').waitFor();
    await page.getByRole('button', { name: 'Number of loops: one more' }).click();
    await page.locator('#order-error').waitFor({ state: 'detached' });
    await legs.press('Enter');
    await page.waitForURL(MADE);
  });

  it('starts anew with another Lagrangian', async () => {
    const page = await stage.open(typed('legs=h+h+s+s&by=powers&power:rho=2&keep=1PI'));
    await alive(page);
    await page.getByRole('link', { name: 'φ⁴', exact: true }).click();
    await page.waitForFunction(() => document.querySelector<HTMLInputElement>('#legs')?.value === 'phi phi');
    expect(await page.getByLabel('power of rho').count()).toBe(0);
    await page.getByLabel('power of lambda').fill('2');
    // ⟨φφ⟩ at λ², 1PI: the sunset and the double bubble on a line (common practice).
    await page.locator('.expected-count', { hasText: /^2 diagrams$/ }).waitFor();
  });

  it('refuses an infinite order at the order', async () => {
    const lagrangian = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - c phi - lambda/4! phi^4';
    const page = await stage.open(typed('legs=phi+phi&by=loops&loops=1&keep=connected', lagrangian));
    expect(await page.locator('#order-error').textContent()).toContain('infinite');
  });

  it('tells a visitor the limit before anything runs', async () => {
    const page = await stage.open(typed('legs=h+h+h+h&by=loops&loops=5&keep=1PI'));
    await alive(page);
    await page.getByText('the limit for a visitor is').waitFor();
    expect(await page.getByRole('button', { name: 'Expand' }).getAttribute('aria-disabled')).toBe('true');
  });

  it('offers what is computed already', async () => {
    const page = await stage.openAs('author', '/models');
    await page.goto(
      (await page
        .getByRole('row', { name: /Saltmarsh portal/ })
        .getByRole('link', { name: 'Expand' })
        .getAttribute('href'))!,
    );
    await alive(page);
    const stored = page.getByRole('link', { name: 'open the stored list' });
    await page.getByLabel('Field operators, in order').fill('h h s s');
    await stored.waitFor({ timeout: 30_000 });
    const id = MADE.exec((await stored.getAttribute('href'))!)![1];
    await page.goto(`/expansions/new?from=${id}`);
    expect(await page.getByLabel('Field operators, in order').inputValue()).toBe('h h s s');
    expect(await page.getByRole('radio', { name: '1PI' }).isChecked()).toBe(true);
    expect(await page.getByRole('heading', { level: 2, name: 'Saltmarsh portal' }).count()).toBe(1);
  });
});

describe('without JavaScript', () => {
  it('counts, refuses without losing anything, and expands', async () => {
    const page = await stage.open('/expansions/new', { javaScriptEnabled: false });
    await page.getByRole('textbox', { name: 'Lagrangian' }).fill(PORTAL);
    await page.getByLabel('Field operators, in order').fill('h h q');
    await page.getByLabel('Powers of couplings').check();
    await page.getByRole('radio', { name: 'Connected W' }).check();
    await page.getByRole('checkbox', { name: 'Tadpoles' }).check();
    await page.getByRole('button', { name: 'Expand' }).click();
    expect(await page.locator('#legs-error').textContent()).toContain('q');
    expect(await page.getByRole('radio', { name: 'Connected W' }).isChecked()).toBe(true);
    expect(await page.getByRole('checkbox', { name: 'Tadpoles' }).isChecked()).toBe(true);
    expect(await page.getByRole('textbox', { name: 'Lagrangian' }).inputValue()).toBe(PORTAL);
    await page.getByLabel('power of rho').fill('1');
    await page.getByLabel('Field operators, in order').fill('h h s s');
    await page.getByRole('button', { name: 'Count first' }).click();
    // One vertex ρ with its four legs: one diagram (counted by hand).
    expect(await countOf(page).textContent()).toBe('1 diagram');
    await page.getByRole('button', { name: 'Expand' }).click();
    await page.waitForURL(MADE);
  });

  it('cancels a computation and starts it again by plain forms', async () => {
    const ask = typed('legs=h+h&by=loops&loops=3&keep=1PI&title=test+job:+slow');
    const page = await stage.openAs('author', ask, { javaScriptEnabled: false });
    await page.getByRole('button', { name: 'Expand' }).click();
    await page.waitForURL(MADE);
    await page.goto('/jobs');
    await page.getByRole('button', { name: 'Cancel: test job: slow' }).click();
    await page.getByRole('button', { name: 'Try again: test job: slow' }).click();
    await page.getByRole('button', { name: 'Cancel: test job: slow' }).click();
    expect(await page.getByRole('region', { name: 'Ended' }).textContent()).toContain('Cancelled');
  });
});

describe('computations', () => {
  it('run in sight, are cancelled, and start again', async () => {
    const page = await stage.openAs('lead', typed('legs=h+h&by=loops&loops=4&keep=1PI&title=test+job:+slow'));
    await alive(page);
    await page.getByRole('button', { name: 'Expand' }).click();
    await page.waitForURL(MADE);
    const id = MADE.exec(page.url())![1];
    await page.goto('/jobs');
    await alive(page);
    await page.getByRole('button', { name: 'Cancel: test job: slow' }).click();
    await page.getByRole('button', { name: 'Try again: test job: slow' }).waitFor();
    const ended = page.getByRole('region', { name: 'Ended' });
    expect(await ended.textContent()).toContain('Cancelled');
    await page.getByRole('button', { name: 'Try again: test job: slow' }).click();
    await page.getByRole('button', { name: 'Cancel: test job: slow' }).waitFor();
    await alive(page);
    // Cancelled elsewhere: the page sees it by itself.
    await page.evaluate((path) => fetch(path, { method: 'DELETE' }), `/api/v1/expansions/${id}`);
    await page.getByRole('button', { name: 'Try again: test job: slow' }).waitFor();
    expect(await page.getByRole('region', { name: 'Under way' }).textContent()).toContain('Nothing');
  });
});

describe('every screen', () => {
  const screens = ['/expansions/new', typed('legs=h+h+s+s&by=powers&power:rho=2&keep=1PI'), '/expansions', '/jobs'];

  it.each(['light', 'dark'] as const)('has no accessibility fault in %s, and fits a phone', async (colorScheme) => {
    for (const path of screens) {
      const page = await stage.open(path, { ...PHONE, colorScheme });
      await alive(page);
      expect([path, await faults(page), await overflows(page)]).toEqual([path, [], false]);
      await page.context().close();
    }
  });

  it('needs less than 125 KiB of scripts for the composer', async () => {
    const page = await stage.open('/expansions/new');
    await alive(page);
    const bytes = await page.evaluate(() =>
      performance
        .getEntriesByType('resource')
        .filter(({ name }) => name.endsWith('.js'))
        .map((entry) => (entry as PerformanceResourceTiming).encodedBodySize),
    );
    expect(bytes.length).toBeGreaterThan(3);
    expect(bytes.reduce((sum, size) => sum + size, 0)).toBeLessThan(125 * 1024);
  });

  it('writes no error to the console', () => {
    // A refused request is a 422, which the browser notes by itself; an expansion's own page is tested elsewhere.
    expect(stage.errors.filter((line) => !/status of 4\d\d/.test(line) && !MADE.test(line.split(': ')[0]!))).toEqual(
      [],
    );
  });
});
