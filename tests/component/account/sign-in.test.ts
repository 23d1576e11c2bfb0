import { flushPromises } from '@vue/test-utils';
import { afterEach, describe, expect, it, vi } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';
import SignInPage from '#src/pages/account/SignInPage.vue';
import { byRole, fieldNamed, textOf, typeInto } from '#tests/support/by-role.ts';
import { anId } from '#tests/support/builders.ts';
import { type FakeAnswer, aProblem, fakeApi } from '#tests/support/fake-api.ts';
import { mountPage } from '#tests/support/mount-app.ts';

const ACCOUNT: Account = { id: anId(1), email: 'developer@example.test', name: 'Developer', teams: [] };

let unmount = () => {};
afterEach(() => {
  unmount();
  vi.unstubAllGlobals();
});

async function signInWith(answer: FakeAnswer, returnTo: string | null = null) {
  const sent = fakeApi(() => answer);
  const mounted = await mountPage({ page: SignInPage, props: { returnTo } });
  unmount = mounted.unmount;
  typeInto(fieldNamed(document.body, 'E-mail'), ' developer@example.test ');
  typeInto(fieldNamed(document.body, 'Password'), ' with spaces kept ');
  byRole(document.body, 'button', 'Sign in').click();
  await flushPromises();
  return { sent, router: mounted.router };
}

describe('signing in', () => {
  it('sends the address trimmed and the password as it is, and goes to the start page', async () => {
    const { sent, router } = await signInWith({ status: 200, body: ACCOUNT });
    expect(sent[0]).toMatchObject({
      method: 'POST',
      path: '/auth/sign-in',
      body: { email: 'developer@example.test', password: ' with spaces kept ' },
    });
    expect(router.currentRoute.value.name).toBe('home');
  });

  it('goes back to where the person wanted to go', async () => {
    const { router } = await signInWith({ status: 200, body: ACCOUNT }, '/account?x=1');
    expect(router.currentRoute.value.fullPath).toBe('/account?x=1');
  });

  it('says that it was refused, in words that name neither of the two', async () => {
    const detail = 'The e-mail address or the password is not right.';
    const { router } = await signInWith(aProblem('wrong-credentials', 401, { detail }));
    expect(textOf(byRole(document.body, 'alert'))).toContain(detail);
    expect(router.currentRoute.value.path).toBe('/page');
  });

  it('marks the field that the server names', async () => {
    const errors = [{ pointer: '#/email', code: 'format', detail: 'email must be an e-mail address.' }];
    await signInWith(aProblem('invalid-fields', 422, { errors }));
    expect(fieldNamed(document.body, 'E-mail').getAttribute('aria-invalid')).toBe('true');
    expect(fieldNamed(document.body, 'Password').getAttribute('aria-invalid')).not.toBe('true');
    expect(textOf(document.body)).toContain('email must be an e-mail address.');
  });

  it('shows an error about something that is no field of the form above the form', async () => {
    const errors = [{ pointer: '#/device', code: 'x', detail: 'The device is unknown.' }];
    await signInWith(aProblem('invalid-fields', 422, { errors, detail: 'The device is unknown.' }));
    expect(textOf(byRole(document.body, 'alert'))).toContain('The device is unknown.');
  });

  it('tells when no answer came', async () => {
    await signInWith('no network');
    expect(textOf(byRole(document.body, 'alert'))).toContain('No answer from the server');
  });
});
