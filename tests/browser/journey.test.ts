import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';

import { SCREEN_SIZES, type ScreenSize, openBrowser } from '#tests/support/browser.ts';

import {
  aPerson,
  goToArea,
  invite,
  saveVersion,
  scrollsSideways,
  signUpByLink,
  signUpWithTeam,
  startSpec,
  writeLine,
} from './journey-steps.ts';

/** A figure of the bench or of a sheet, such as `159 ml`, wherever its size puts it. */
async function figureText(page: Page, name: RegExp): Promise<string> {
  return (await page.locator('dl, table').getByText(name).first().locator('xpath=..').innerText()).replaceAll(
    '\u00a0',
    ' ',
  );
}

async function openNewestVersion(page: Page, drink: string): Promise<void> {
  await goToArea(page, 'Specs');
  await page.getByRole('link', { name: drink }).first().click();
  await page
    .getByRole('link', { name: /version/i })
    .first()
    .click();
  await page.getByRole('link', { name: /^Sheet of version 2/ }).click();
  await page.getByRole('heading', { name: 'Tasting notes' }).waitFor();
}

describe.each(Object.keys(SCREEN_SIZES) as ScreenSize[])('on a %s, the whole job', (size) => {
  it('goes from signing up to a locked version that a bartender reads and cannot change', async () => {
    const key = `${size}-${Date.now()}`;
    const drink = 'Groyne';
    const developer = await openBrowser({ size });
    await signUpWithTeam(developer.page, aPerson('Developer', key), 'The Turnstone');

    // A drink from real ingredients, and what is in it after shaking.
    await startSpec(developer.page, drink);
    const bench = developer.page;
    await writeLine(bench, '60 ml', 'white rum', 'White rum');
    await writeLine(bench, '3/4 oz', 'lime ju', 'Lime juice, fresh');
    await writeLine(bench, '22,5', 'simple syr', 'Simple syrup 1:1 by mass');
    await bench.getByText('saved', { exact: false }).first().waitFor();
    expect(await scrollsSideways(bench)).toBe(false);
    await saveVersion(bench, 'the first try');

    // A change, with the draft kept through a reload.
    await bench.reload();
    const limeAmount = bench.getByLabel('Amount of Lime juice, fresh');
    await limeAmount.fill('20 ml');
    await limeAmount.blur();
    await saveVersion(bench, 'less sour');
    await bench.getByRole('link', { name: /Compare it with version 1/ }).click();

    // Both side by side: what differs is said in words.
    await bench.getByRole('heading', { name: 'Compare' }).waitFor();
    const lime = bench.getByRole('row', { name: /Lime juice, fresh/ }).first();
    await lime.waitFor();
    const limeText = (await lime.innerText()).replaceAll('\u00a0', ' ');
    expect(limeText).toContain('20 ml');
    expect(limeText).toMatch(/2\.2 ml (more|less)/);
    expect(await scrollsSideways(bench)).toBe(false);

    const forMenuWriter = await invite(bench, { label: 'the menu writer', role: 'menu writer' });
    const forBartender = await invite(bench, { label: 'the bartender', role: 'bartender' });

    // A colleague tastes, the menu writer locks.
    const bartender = await openBrowser({ size });
    await signUpByLink(bartender.page, aPerson('Bartender', key), forBartender);
    await openNewestVersion(bartender.page, drink);
    await bartender.page.getByRole('button', { name: 'Add a note' }).click();
    await bartender.page.getByLabel('In words').fill('Rounder than the first.');
    await bartender.page.getByRole('button', { name: 'Add the note' }).click();
    await bartender.page.getByText('Rounder than the first.').waitFor();

    const menuWriter = await openBrowser({ size });
    await signUpByLink(menuWriter.page, aPerson('Menu writer', key), forMenuWriter);
    await openNewestVersion(menuWriter.page, drink);
    await menuWriter.page.getByText('Rounder than the first.').waitFor();
    await menuWriter.page.getByRole('button', { name: /^Lock/ }).click();
    const lock = menuWriter.page.getByRole('dialog');
    await lock.getByText('not reviewed', { exact: false }).first().waitFor();
    await lock.getByRole('checkbox').click();
    await lock.getByRole('button', { name: 'Sign and lock' }).click();
    await menuWriter.page.getByRole('heading', { name: 'Signed' }).waitFor();

    // The bartender reads it and cannot change it.
    const sheet = bartender.page;
    await sheet.reload();
    await sheet.getByText('locked').first().waitFor();
    await sheet.getByText('Lime juice, fresh').first().waitFor();
    expect(await figureText(sheet, /^Final volume/i)).toMatch(/15\d ml/);
    expect(
      await sheet.getByRole('button', { name: /^(Lock|Retire|Put on trial|Undo the lock)/ }).count(),
    ).toBe(0);
    expect(await scrollsSideways(sheet)).toBe(false);
    await goToArea(sheet, 'Specs');
    expect(await sheet.getByRole('button', { name: 'New spec' }).count()).toBe(0);
    await sheet.getByRole('link', { name: drink }).first().click();
    await sheet.getByRole('heading', { name: drink }).waitFor();
    expect(await sheet.getByRole('button', { name: 'Save version' }).count()).toBe(0);
    expect(await sheet.getByLabel('Amount of a new line').count()).toBe(0);
  });
});
