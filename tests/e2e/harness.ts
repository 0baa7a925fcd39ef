import AxeBuilder from '@axe-core/playwright';
import { type Browser, type BrowserContext, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { built, type LiveServer, removeData, startServer } from '../server/harness.ts';

/** The built server with a data folder of its own, and a browser that looks at it. */
export interface Stage {
  readonly server: LiveServer;
  readonly base: string;
  /** A page of a new browser context (own cookies). Every error of its console is collected in `errors`. */
  open(path: string, options?: BrowserContextOptions): Promise<Page>;
  /** A page signed in as a demo account; starts at `path`. */
  openAs(role: Role, path: string, options?: BrowserContextOptions): Promise<Page>;
  /** What any page wrote to its console as an error, and every exception of a script. */
  readonly errors: string[];
  close(): Promise<void>;
}

export type Role = 'reader' | 'checker' | 'author' | 'lead';

export const PHONE = { viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true } as const;
export const DESK = { viewport: { width: 1280, height: 900 } } as const;

const EXECUTABLE = process.env.CHROMIUM_PATH ?? '/usr/bin/chromium';

export const launch = (): Promise<Browser> =>
  chromium.launch({ executablePath: EXECUTABLE, args: ['--no-sandbox', '--disable-gpu'] });

/**
 * Builds where sources changed, starts the server with the demo's accounts and models, starts Chromium.
 * Call in beforeAll, and `close` in afterAll.
 */
export async function raise(environment: Record<string, string> = {}): Promise<Stage> {
  await built();
  const server = await startServer({ DEMO: '1', ...environment });
  const browser = await launch();
  const contexts: BrowserContext[] = [];
  const errors: string[] = [];

  const open = async (path: string, options: BrowserContextOptions = {}): Promise<Page> => {
    const context = await browser.newContext({ baseURL: server.base, ...DESK, ...options });
    contexts.push(context);
    const page = await context.newPage();
    page.on('pageerror', (error) => errors.push(`${page.url()}: ${error.message}`));
    page.on('console', (message) => message.type() === 'error' && errors.push(`${page.url()}: ${message.text()}`));
    await page.goto(path);
    return page;
  };

  return {
    server,
    base: server.base,
    errors,
    open,
    openAs: async (role, path, options = {}) => {
      const page = await open(`/signin?next=${encodeURIComponent(path)}`, options);
      await page.getByRole('button', { name: `${role}@`, exact: false }).click();
      await page.waitForURL((url) => url.pathname !== '/signin');
      return page;
    },
    close: async () => {
      await Promise.all(contexts.map((context) => context.close()));
      await browser.close();
      await server.stop();
      removeData(server);
    },
  };
}

/** Accessibility faults of the page as it stands, as "rule: element" lines; empty when there are none. */
export async function faults(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  return violations.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id}: ${target.join(' ')}`));
}

/** Whether the page is wider than its window: on a phone nothing but a scrolling region may be. */
export const overflows = (page: Page): Promise<boolean> =>
  page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth);

/** Waits until every island of the page is alive. */
export const alive = (page: Page): Promise<unknown> =>
  page.waitForFunction(() => document.querySelector('astro-island[ssr]') === null);
