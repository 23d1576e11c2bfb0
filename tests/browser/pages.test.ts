import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';
import type { SpecPage } from '#shared/contracts/spec.ts';
import type { VersionList } from '#shared/contracts/version.ts';
import { SCREEN_SIZES, type ScreenSize, openBrowser } from '#tests/support/browser.ts';

import { scrollsSideways } from './journey-steps.ts';

const SCHEMES = ['light', 'dark'] as const;

async function signInToDemo(page: Page): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill('manager@example.test');
  await page.getByLabel('Password', { exact: true }).fill('gannet-manager');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: 'Specs', exact: true }).waitFor();
}

/** Every page with an address, filled with the demo team's own data, and the heading that tells it is there. */
async function demoPages(page: Page): Promise<[path: string, heading: RegExp][]> {
  const get = async <Body>(path: string) => (await (await page.request.get(`/api${path}`)).json()) as Body;
  const { teams } = await get<Account>('/auth/me');
  const teamId = teams[0]?.teamId ?? '';
  const { items: specs } = await get<SpecPage>(`/teams/${teamId}/specs?search=harbour`);
  const specId = specs.find(({ variantName }) => variantName === null)?.id ?? '';
  const { items: versions } = await get<VersionList>(`/teams/${teamId}/specs/${specId}/versions`);
  const ids = versions.map(({ id }) => id);
  return [
    [`/t/${teamId}/specs`, /^Specs$/],
    [`/t/${teamId}/specs/${specId}`, /^Harbour Light$/],
    [`/t/${teamId}/specs/${specId}/versions`, /Harbour Light/],
    [`/t/${teamId}/versions/${ids[0] ?? ''}`, /^Harbour Light$/],
    [`/t/${teamId}/compare?v=${ids.slice(0, 3).join(',')}`, /^Compare$/],
    [`/t/${teamId}/ingredients`, /^Ingredients$/],
    [`/t/${teamId}/ingredients/import`, /Import/i],
    [`/t/${teamId}/glasses`, /^Glasses$/],
    [`/t/${teamId}/team`, /^Team$/],
    [`/t/${teamId}/history`, /^History$/],
    ['/account', /^Account$/],
  ];
}

describe.each(Object.keys(SCREEN_SIZES) as ScreenSize[])('on a %s', (size) => {
  it.each(SCHEMES)(
    'every page in %s fits its screen and passes the accessibility rules',
    async (colorScheme) => {
      const { page } = await openBrowser({ size });
      await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
      await signInToDemo(page);
      const faults: string[] = [];
      for (const [path, heading] of await demoPages(page)) {
        await page.goto(path);
        await page.getByRole('heading', { name: heading }).first().waitFor();
        await page.waitForLoadState('networkidle');
        if (await scrollsSideways(page)) faults.push(`${path} scrolls sideways`);
        const { violations } = await new AxeBuilder({ page })
          .withTags(['wcag2a', 'wcag2aa', 'wcag21aa'])
          .analyze();
        for (const { id, nodes } of violations)
          faults.push(`${path} ${id}: ${nodes[0]?.target.join(' ') ?? ''}`);
      }
      expect(faults).toEqual([]);
    },
  );
});
