import type { Page } from 'playwright-core';

/** What people do in the browser, each step found by role and label as a person finds it. */

export interface Person {
  name: string;
  email: string;
  password: string;
}

export function aPerson(name: string, key: string): Person {
  return {
    name,
    email: `${name.toLowerCase().replaceAll(' ', '-')}-${key}@example.test`,
    password: 'a long enough one',
  };
}

async function fillSignUp(page: Page, person: Person): Promise<void> {
  await page.getByLabel('Your name').fill(person.name);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password', { exact: true }).fill(person.password);
}

export async function signUpWithTeam(page: Page, person: Person, teamName: string): Promise<void> {
  await page.goto('/sign-up');
  await fillSignUp(page, person);
  await page.getByLabel('Team', { exact: true }).fill(teamName);
  await page.getByRole('button', { name: 'Sign up' }).click();
  await page.getByRole('heading', { name: 'Specs', exact: true }).waitFor();
}

export async function signUpByLink(page: Page, person: Person, link: string): Promise<void> {
  await page.goto(link);
  await fillSignUp(page, person);
  await page.getByRole('button', { name: 'Sign up and join' }).click();
  await page.getByRole('heading', { name: 'Specs', exact: true }).waitFor();
}

/** Makes a one-time link into the team, as its manager. */
export async function invite(page: Page, input: { label: string; role: string }): Promise<string> {
  await goToArea(page, 'Team');
  await page.getByRole('button', { name: 'Invite somebody' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Whom the link is for').fill(input.label);
  for (const box of await dialog.getByRole('checkbox', { checked: true }).all()) await box.click();
  await dialog.getByRole('checkbox', { name: input.role, exact: true }).click();
  await dialog.getByRole('button', { name: 'Make the link' }).click();
  const link = await dialog.getByLabel('Link', { exact: true }).inputValue();
  await dialog.getByRole('button', { name: 'Done' }).click();
  return link;
}

export async function goToArea(
  page: Page,
  area: 'Specs' | 'Ingredients' | 'Glasses' | 'Team',
): Promise<void> {
  await page.getByRole('navigation').getByRole('link', { name: area }).click();
  await page.getByRole('heading', { name: area, exact: true }).waitFor();
}

export async function startSpec(page: Page, name: string): Promise<void> {
  await page.getByRole('button', { name: 'New spec' }).first().click();
  await page.getByLabel('Name of the drink').fill(name);
  await page.getByRole('button', { name: 'To the bench' }).click();
  await page.getByLabel('Amount of a new line').waitFor();
}

/** Writes one line at the end: the amount as typed, and the ingredient found by a few letters. */
export async function writeLine(
  page: Page,
  amount: string,
  letters: string,
  ingredient: string,
): Promise<void> {
  const lines = await page.getByLabel(/^Ingredient of line/).count();
  await page.getByLabel('Amount of a new line').fill(amount);
  await page.getByLabel(`Ingredient of line ${lines + 1}`, { exact: true }).fill(letters);
  await page.getByRole('option', { name: ingredient }).first().click();
  await page.getByLabel(`Amount of ${ingredient}`).waitFor();
}

export async function saveVersion(page: Page, why: string): Promise<void> {
  await page.getByRole('button', { name: 'Save version' }).first().click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('textbox').fill(why);
  await dialog.getByRole('button', { name: 'Save version' }).click();
  await dialog.waitFor({ state: 'detached' });
}

/** Whether the page scrolls sideways, which no page may. */
export function scrollsSideways(page: Page): Promise<boolean> {
  return page.evaluate(() => document.documentElement.scrollWidth > window.innerWidth);
}
