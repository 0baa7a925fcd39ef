import type { BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { alive, DESK, faults, overflows, PHONE, raise, type Stage } from './harness.ts';

/** The main way through, as a new visitor goes it: write a model, ask for a correlator, see every diagram with its proof, open one. */
let stage: Stage;
beforeAll(async () => {
  stage = await raise();
});
afterAll(() => stage?.close());

const PORTAL = '1/2 (d h)^2 - 1/2 m^2 h^2 + 1/2 (d s)^2 - 1/2 M^2 s^2 - lambda/4! h^4 - rho/4 h^2 s^2 - sigma/4! s^4';

async function wellMade(page: Page): Promise<void> {
  expect([page.url(), await faults(page)]).toEqual([page.url(), []]);
  expect([page.url(), await overflows(page)]).toEqual([page.url(), false]);
}

/** From the start page to the composer, with a mistake made and mended on the way. */
async function writeModel(page: Page): Promise<void> {
  await wellMade(page);
  await page.getByRole('link', { name: 'Write a model' }).click();
  await alive(page);
  const text = page.getByRole('textbox', { name: 'Lagrangian' });
  await text.fill(PORTAL.replace('h^4', 'h^^4'));
  await page
    .getByText(/Expected/)
    .first()
    .waitFor();
  await text.fill(PORTAL);
  await page.getByText('Power counting').waitFor();
  expect(await page.getByLabel('Loop order of rho').count()).toBe(1);
  await wellMade(page);
  await page.getByRole('button', { name: 'Expand' }).click();
  await page.waitForURL(/\/expansions\/new/);
}

async function compose(page: Page): Promise<void> {
  await alive(page);
  await page.getByLabel('Field operators, in order').fill('h h s s');
  await page.locator('.expected-count', { hasText: /^4 diagrams$/ }).waitFor();
  await wellMade(page);
  await page.getByRole('button', { name: 'Expand' }).click();
  await page.waitForURL(/\/expansions\/[0-9a-z]{24}$/);
}

async function readResult(page: Page): Promise<void> {
  await page.locator('.led .ok', { hasText: 'balanced' }).waitFor();
  expect(await page.locator('.led').textContent()).toMatch(/4 diagrams.*= ?3 from the list.*3 from the/s);
  await page.getByRole('button', { name: 'Canvas' }).click();
  await page.locator('.canvas[data-ready="true"] .react-flow__node-diagram').nth(3).waitFor();
  expect(await page.locator('.react-flow__node-plate').count()).toBe(3);
  await wellMade(page);
  await page.getByRole('button', { name: 'Table' }).click();
  await page.locator('.grid-body tr').nth(3).waitFor();
  await wellMade(page);
  await page.getByRole('button', { name: 'Plates' }).click();
  await page.locator('a.fig').nth(1).click();
  await page.waitForURL(/\/diagrams\/w1/);
}

async function readDiagram(page: Page): Promise<void> {
  await page.getByText('The two routes agree.').waitFor();
  expect(await page.locator('[data-vertex]').count()).toBe(2);
  await wellMade(page);
  await page.getByRole('link', { name: 'Next' }).click();
  await page.getByRole('heading', { name: /Diagram 3 of 4/ }).waitFor();
}

async function keep(page: Page, name: string): Promise<void> {
  await page.goto('/signup');
  await page.getByLabel('Name', { exact: false }).first().fill('A new author');
  await page.getByLabel('E-mail', { exact: false }).first().fill(`${name}@example.org`);
  await page.locator('input[type=password]').first().fill('a password that is long enough');
  await page.locator('main form button[type=submit]').first().click();
  await page.waitForURL((url) => url.pathname !== '/signup');
  await page.goto('/expansions');
  // What the visitor computed belongs to the account now.
  expect(await page.getByRole('region', { name: 'Yours' }).getByRole('link').count()).toBeGreaterThan(0);
  await wellMade(page);
}

const ways: [string, BrowserContextOptions][] = [
  ['light, wide', { ...DESK, colorScheme: 'light' }],
  ['dark, wide', { ...DESK, colorScheme: 'dark' }],
  ['light, phone', { ...PHONE, colorScheme: 'light' }],
  ['dark, phone', { ...PHONE, colorScheme: 'dark' }],
];

describe('the main way through', () => {
  it.each(ways)('%s', async (name, options) => {
    const page = await stage.open('/', options);
    await writeModel(page);
    await compose(page);
    await readResult(page);
    await readDiagram(page);
    await keep(page, name.replace(/\W+/g, '-'));
    expect(stage.errors).toEqual([]);
  });
});
