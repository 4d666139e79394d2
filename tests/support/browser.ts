import axe from 'axe-core';
import { chromium } from 'playwright-core';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export function openBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium', args: FLAGS });
}

/** A phone held upright, and a desk. */
export const SCREENS = {
  phone: { viewport: { width: 390, height: 844 }, hasTouch: true },
  desk: { viewport: { width: 1280, height: 900 } },
} as const satisfies Record<string, BrowserContextOptions>;

export type Visit = {
  readonly page: Page;
  /** What the page wrote to the console as an error or warning, or threw; blocked styles and scripts are among it. */
  readonly complaints: readonly string[];
  readonly end: () => Promise<void>;
};

/** A visitor with a clean browser of their own, at an origin. */
export async function visit(browser: Browser, baseURL: string, options: BrowserContextOptions = {}): Promise<Visit> {
  const context = await browser.newContext({ baseURL, ...SCREENS.desk, ...options });
  const page = await context.newPage();
  page.setDefaultTimeout(20_000);
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  return { page, complaints, end: () => context.close() };
}

/** What axe finds on the page as it stands: rule, then the elements. Run by the debugger, which a content security policy does not bind. */
export async function axeFindings(page: Page): Promise<string[]> {
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate(() => (globalThis as unknown as { readonly axe: typeof axe }).axe.run(document));
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`);
}

/** Whether the page is wider than the screen it is on. */
export function overflows(page: Page): Promise<boolean> {
  return page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth);
}
