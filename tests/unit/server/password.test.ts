import * as argon2 from '@node-rs/argon2';
import { beforeEach, describe, expect, it, vi } from 'vitest';

import { hashPassword, isRightPassword } from '#server/modules/accounts/password.ts';

vi.mock('@node-rs/argon2', async (importOriginal) => {
  const original = await importOriginal<typeof argon2>();
  return { ...original, verify: vi.fn(original.verify) };
});

beforeEach(() => {
  vi.mocked(argon2.verify).mockClear();
});

describe('a password', () => {
  it('is right with its own hash only', async () => {
    const hash = await hashPassword('a long enough password');
    expect(await isRightPassword('a long enough password', hash)).toBe(true);
    expect(await isRightPassword('a long enough passwore', hash)).toBe(false);
  });

  it('has another hash each time', async () => {
    expect(await hashPassword('the same')).not.toBe(await hashPassword('the same'));
  });

  it('of nobody costs the same work as one of somebody', async () => {
    const hash = await hashPassword('a long enough password');
    await isRightPassword('a guess', hash);
    await isRightPassword('a guess', null);
    const [ofSomebody, ofNobody] = vi.mocked(argon2.verify).mock.calls.map(([used]) => String(used));
    expect(argon2.verify).toHaveBeenCalledTimes(2);
    expect(argon2.parseOptions(ofNobody ?? '')).toEqual(argon2.parseOptions(ofSomebody ?? ''));
  });

  it('of nobody is never right, not even the one that is compared with', async () => {
    expect(await isRightPassword('the password of nobody', null)).toBe(false);
  });
});
