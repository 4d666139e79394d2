import axe from 'axe-core';
import { chromium } from 'playwright-core';
import type { Browser, BrowserContextOptions, ConsoleMessage, Page } from 'playwright-core';
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

/** Pages that nobody uses: a new process for each visit, and the site's scripts compiled anew, would be most of a visit's time. */
const idle = new WeakMap<Browser, Map<string, Page[]>>();

function idlePages(browser: Browser, options: BrowserContextOptions): Page[] {
  const ofBrowser = idle.get(browser) ?? new Map<string, Page[]>();
  idle.set(browser, ofBrowser);
  const key = JSON.stringify(options);
  const pages = ofBrowser.get(key) ?? [];
  ofBrowser.set(key, pages);
  return pages;
}

/**
 * A visitor at an origin, whom the browser has never seen: no cookie, nothing stored; only the site's files may be in its cache. A test
 * that opens a debugger's session detaches it.
 */
export async function visit(browser: Browser, baseURL: string, options: BrowserContextOptions = {}): Promise<Visit> {
  const settings = { baseURL, ...SCREENS.desk, ...options };
  const pages = idlePages(browser, settings);
  const page = pages.pop() ?? (await (await browser.newContext(settings)).newPage());
  page.setDefaultTimeout(20_000);
  const complaints: string[] = [];
  const hear = (message: ConsoleMessage): void => {
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
  };
  const note = (error: Error): void => void complaints.push(error.message);
  page.on('console', hear).on('pageerror', note);
  const end = async (): Promise<void> => {
    page.off('console', hear).off('pageerror', note);
    const context = page.context();
    for (const one of context.pages()) if (one !== page) await one.close();
    await page.unrouteAll({ behavior: 'ignoreErrors' });
    await context.setOffline(false);
    await page.emulateMedia({ media: null });
    // A page of the same origin without scripts: nothing of the site runs on, and its process is kept.
    await page.goto('/healthz');
    const storage = await context.newCDPSession(page);
    await storage.send('Storage.clearDataForOrigin', { origin: new URL(baseURL).origin, storageTypes: 'cookies,local_storage,indexeddb,service_workers' });
    await storage.detach();
    await page.evaluate(() => {
      sessionStorage.clear();
    });
    await context.clearCookies();
    pages.push(page);
  };
  return { page, complaints, end };
}

/** What axe finds on the page once it stands: rule, then the elements. Run by the debugger, which a content security policy does not bind. */
export async function axeFindings(page: Page): Promise<string[]> {
  await pageStands(page);
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
