import { describe, expect, it } from 'vitest';

import { openBrowser } from '#tests/support/browser.ts';

import { aPerson, signUpWithTeam, startSpec, writeLine } from './journey-steps.ts';

const key = () => `safety-${Date.now()}`;

describe('what somebody wrote on the bench', () => {
  it('stays through a lost connection and a reload, and is sent when the connection is back', async () => {
    const { page, context, expectConsole } = await openBrowser({ size: 'desktop' });
    expectConsole(/ERR_INTERNET_DISCONNECTED|Failed to load resource/);
    await signUpWithTeam(page, aPerson('Developer', key()), 'The Knot');
    await startSpec(page, 'Tide Table');
    await writeLine(page, '50 ml', 'white rum', 'White rum');
    await page
      .getByText(/^\W*saved$/)
      .first()
      .waitFor();

    await context.setOffline(true);
    const amount = page.getByLabel('Amount of White rum');
    await amount.fill('55 ml');
    await amount.blur();
    await page
      .getByText(/kept on this device/i)
      .first()
      .waitFor();

    await context.setOffline(false);
    await page.reload();
    await page.getByLabel('Amount of White rum').waitFor();
    expect((await page.getByLabel('Amount of White rum').inputValue()).replaceAll('\u00a0', ' ')).toBe(
      '55 ml',
    );
    await page
      .getByText(/^\W*saved$/)
      .first()
      .waitFor();
  });

  it('is never overwritten by somebody else’s save: both states are shown, and the choice is theirs', async () => {
    const { page, context, expectConsole } = await openBrowser({ size: 'desktop' });
    expectConsole(/412/);
    await signUpWithTeam(page, aPerson('Developer', key()), 'The Dunlin');
    await startSpec(page, 'Undertow');
    await writeLine(page, '50 ml', 'white rum', 'White rum');
    await page
      .getByText(/^\W*saved$/)
      .first()
      .waitFor();

    const second = await context.newPage();
    await second.goto(page.url());
    const theirs = second.getByLabel('Amount of White rum');
    await theirs.fill('40 ml');
    await theirs.blur();
    await second
      .getByText(/^\W*saved$/)
      .first()
      .waitFor();

    const mine = page.getByLabel('Amount of White rum');
    await mine.fill('60 ml');
    await mine.blur();
    await page.getByRole('button', { name: 'Keep mine' }).waitFor();
    const conflict = (await page.locator('.draft-conflict').innerText()).replaceAll('\u00a0', ' ');
    expect(conflict).toContain('60 ml');
    expect(conflict).toContain('40 ml');
    await page.getByRole('button', { name: 'Keep mine' }).click();
    await page
      .getByText(/^\W*saved$/)
      .first()
      .waitFor();
    await second.reload();
    await second.getByLabel('Amount of White rum').waitFor();
    expect((await second.getByLabel('Amount of White rum').inputValue()).replaceAll('\u00a0', ' ')).toBe(
      '60 ml',
    );
  });

  it('that cannot be read stays on its line with the reason, and no version comes of it', async () => {
    const { page } = await openBrowser({ size: 'desktop' });
    await signUpWithTeam(page, aPerson('Developer', key()), 'The Ruff');
    await startSpec(page, 'Spring Tide');
    await writeLine(page, '50 ml', 'white rum', 'White rum');
    for (const text of ['-5', '1e9', 'abc']) {
      const amount = page.getByLabel('Amount of White rum');
      await amount.fill(text);
      await amount.blur();
      await page.locator('[aria-label="Amount of White rum"][aria-invalid="true"]').waitFor();
      expect(await amount.inputValue()).toBe(text);
    }
    await page.getByRole('button', { name: 'Save version' }).first().click();
    expect(await page.getByRole('dialog').count()).toBe(0);
    expect(await page.getByLabel('Amount of White rum').inputValue()).toBe('abc');
  });
});
