import { mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';

const screens = fileURLToPath(new URL('../screens/', import.meta.url));
const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const desktop = { width: 1440, height: 900 };
export const tablet = { width: 1024, height: 768 };
export const phone = { width: 390, height: 844 };

/** Debian's Chromium, without a window. */
export function openBrowser(): Promise<Browser> {
  mkdirSync(screens, { recursive: true });
  return chromium.launch({ executablePath: '/usr/bin/chromium', args: flags });
}

/** A person at a screen: signed in by clicking their name at the provider. */
export async function signInAs(
  browser: Browser,
  person: { url: string; name: string; viewport?: { width: number; height: number }; path?: string },
): Promise<{ page: Page; context: BrowserContext; faults: string[] }> {
  const context = await browser.newContext({ viewport: person.viewport ?? desktop, reducedMotion: 'reduce' });
  const page = await context.newPage();
  const faults: string[] = [];
  page.on('pageerror', (error) => faults.push(error.message));
  page.on('console', (message) => {
    // What a request was refused with is read from the response below.
    if (message.type() === 'error' && !message.text().startsWith('Failed to load resource'))
      faults.push(message.text());
  });
  page.on('response', (response) => {
    // The first look without a session is answered 401.
    if (response.status() >= 400 && response.status() !== 401) faults.push(`${response.status()} ${response.url()}`);
  });
  await page.goto(new URL(person.path ?? '/', person.url).href);
  await page.getByRole('link', { name: 'Sign in' }).click();
  await page.getByRole('button', { name: person.name }).click();
  await page.getByRole('button', { name: person.name }).waitFor();
  return { page, context, faults };
}

/** Keeps a picture of the page. */
export async function picture(page: Page, name: string): Promise<void> {
  await page.screenshot({ path: `${screens}${name}.png` });
}
