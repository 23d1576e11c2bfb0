import { mkdirSync } from 'node:fs';
import { join } from 'node:path';

import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { afterAll, inject, onTestFinished } from 'vitest';

import { PROJECT_ROOT } from '#server/setup/paths.mjs';
import { chromiumPath } from '#server/setup/system-packages.mjs';

import './provided.ts';

/** The two sizes every page has to work at. */
export const SCREEN_SIZES = {
  phone: { width: 390, height: 844 },
  desktop: { width: 1440, height: 900 },
} as const;
export type ScreenSize = keyof typeof SCREEN_SIZES;

/** A person's browser: cookies and storage of their own. */
export interface OpenedBrowser {
  page: Page;
  context: BrowserContext;
  baseUrl: string;
  /** From here on, console messages that match are part of the story, such as the 422 of a refused field. */
  expectConsole: (pattern: RegExp) => void;
}

/** Chromium as root has no sandbox; the others keep it from calling anyone but the server under test. */
const CHROMIUM_FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-dev-shm-usage',
];
const SHOTS = join(PROJECT_ROOT, 'tests', 'browser', 'shots');
/** Asking who is signed in is answered 401 to a stranger, and the browser reports that. */
const ALWAYS_EXPECTED = /\/api\/auth\/me/;

let launched: Promise<Browser> | undefined;

/**
 * Opens a page of the running application inside a test. When the test ends the page is closed, and the test fails
 * if the page reported errors; when the test has failed, a picture is kept in tests/browser/shots.
 */
export async function openBrowser({ size }: { size: ScreenSize }): Promise<OpenedBrowser> {
  launched ??= chromium.launch({ executablePath: chromiumPath(process.env), args: CHROMIUM_FLAGS });
  const browser = await launched;
  const baseUrl = inject('baseUrl');
  const context = await browser.newContext({
    baseURL: baseUrl,
    viewport: SCREEN_SIZES[size],
    hasTouch: size === 'phone',
    isMobile: size === 'phone',
    locale: 'en-GB',
    reducedMotion: 'reduce',
  });
  const page = await context.newPage();
  const complaints = listenTo(context);
  const expected: RegExp[] = [ALWAYS_EXPECTED];
  onTestFinished(async ({ task }) => {
    const unexpected = complaints.filter((text) => !expected.some((pattern) => pattern.test(text)));
    const failed = task.result?.state === 'fail' || unexpected.length > 0;
    if (failed) await keepPictures(context, task.name);
    await context.close();
    if (unexpected.length > 0) throw new Error(`the page reported:\n${unexpected.join('\n')}`);
  });
  return { page, context, baseUrl, expectConsole: (pattern) => void expected.push(pattern) };
}

/** Ends the browser of this test file. */
afterAll(async () => {
  await (await launched)?.close();
  launched = undefined;
});

/** Collects errors of every page: in the console, and not caught. */
function listenTo(context: BrowserContext): string[] {
  const complaints: string[] = [];
  context.on('console', (message) => {
    if (message.type() !== 'error') return;
    complaints.push(`console: ${message.text()} (${message.location().url})`);
  });
  context.on('weberror', (error) => complaints.push(`not caught: ${error.error().message}`));
  return complaints;
}

async function keepPictures(context: BrowserContext, testName: string): Promise<void> {
  mkdirSync(SHOTS, { recursive: true });
  const name = testName
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
    .slice(0, 80);
  for (const [index, page] of context.pages().entries()) {
    // A page that is closing cannot be pictured; the failure itself matters more.
    await page.screenshot({ path: join(SHOTS, `${name}-${index + 1}.png`) }).catch(() => undefined);
  }
}
