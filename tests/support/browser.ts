import axe from 'axe-core';
import { chromium } from 'playwright-core';
import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core';
import { expect } from 'vitest';

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

/** Contexts that nobody uses: loading and compiling the site's scripts anew would be most of a visit's time. */
const idle = new WeakMap<Browser, Map<string, BrowserContext[]>>();

function idleContexts(browser: Browser, options: BrowserContextOptions): BrowserContext[] {
  const ofBrowser = idle.get(browser) ?? new Map<string, BrowserContext[]>();
  idle.set(browser, ofBrowser);
  const key = JSON.stringify(options);
  const contexts = ofBrowser.get(key) ?? [];
  ofBrowser.set(key, contexts);
  return contexts;
}

/** A visitor at an origin, whom the browser has never seen: no cookie, nothing stored; only the site's files may be in its cache. */
export async function visit(browser: Browser, baseURL: string, options: BrowserContextOptions = {}): Promise<Visit> {
  const settings = { baseURL, ...SCREENS.desk, ...options };
  const contexts = idleContexts(browser, settings);
  const context = contexts.pop() ?? (await browser.newContext(settings));
  const page = await context.newPage();
  page.setDefaultTimeout(20_000);
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  const end = async (): Promise<void> => {
    const storage = await context.newCDPSession(page);
    for (const one of context.pages()) if (one !== page) await one.close();
    // Away from the site first: a page that is leaving may still store something.
    await page.goto('about:blank');
    await storage.send('Storage.clearDataForOrigin', { origin: new URL(baseURL).origin, storageTypes: 'cookies,local_storage,indexeddb,service_workers' });
    await page.close();
    await context.clearCookies();
    await context.setOffline(false);
    contexts.push(context);
  };
  return { page, complaints, end };
}

/** What axe finds on the page as it stands: rule, then the elements. Run by the debugger, which a content security policy does not bind. */
export async function axeFindings(page: Page): Promise<string[]> {
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate(() =>
    // What passes is not described: describing it takes three times as long as finding it.
    (globalThis as unknown as { readonly axe: typeof axe }).axe.run(document, { resultTypes: ['violations'] }),
  );
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`);
}

/** Waits until the page stands: its heading, its letters, and nothing in it that is still on its way. */
export async function pageStands(page: Page): Promise<void> {
  await page.getByRole('heading', { level: 1 }).waitFor();
  await expect
    .poll(() => page.evaluate(() => document.fonts.status === 'loaded' && document.querySelector('[aria-busy=true]') === null))
    .toBe(true);
}

/** Whether the page is wider than the screen it is on. */
export function overflows(page: Page): Promise<boolean> {
  return page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth);
}
