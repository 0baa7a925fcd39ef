import { chromium } from 'playwright-core';

/** Chromium without its own network chatter; CHROME names another executable. */
export const launch = () =>
  chromium.launch({
    executablePath: process.env.CHROME ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update'],
  });

/** A fresh context; COOKIE="name=value" signs it in. */
export async function freshContext(browser, base, options = {}) {
  const context = await browser.newContext({ viewport: { width: 1280, height: 800 }, ...options });
  const [name, ...value] = (process.env.COOKIE ?? '').split('=');
  if (name) await context.addCookies([{ name, value: value.join('='), url: base }]);
  return context;
}

export const median = (values) => [...values].sort((a, b) => a - b)[values.length >> 1];

/** Base address and paths of the command line: `node script.mjs http://localhost:4321 / /models`. */
export function addresses(usage) {
  const [base, ...paths] = process.argv.slice(2);
  if (!base?.startsWith('http')) {
    console.error(usage);
    process.exit(2);
  }
  return { base: base.replace(/\/$/, ''), paths: paths.length > 0 ? paths : ['/'] };
}
