import { enableAutoUnmount, flushPromises, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import LockDialog from '#src/components/versions/LockDialog.vue';
import { byRole, textOf } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

async function openDialog() {
  const wrapper = mount(LockDialog, {
    props: {
      title: 'Harbour Sour · version 3',
      lines: [
        {
          id: 'a',
          amount: '22.5 ml',
          amountForAll: null,
          ingredient: 'Lime juice',
          note: 'strained',
          isTop: false,
        },
      ],
      making: [{ label: 'Method', words: 'shake' }],
      build: ['Shake hard.'],
      figures: [{ label: 'Final ABV', words: '17.2 %' }],
      allergens: { contains: ['eggs'], mayContain: [], notReviewed: ['House vermouth'] },
      warnings: ['The drink is 12 ml more than the glass holds.'],
      replacedNumber: 2,
      signer: 'Menu writer',
      isSaving: false,
      failure: null,
    },
    attachTo: document.body,
  });
  await flushPromises();
  return { wrapper, dialog: byRole(document.body, 'dialog', 'Lock Harbour Sour · version 3') };
}

describe('the lock dialog', () => {
  it('lists everything that is being signed', async () => {
    const { dialog } = await openDialog();
    const words = textOf(dialog);
    for (const part of [
      /22\.5 ml Lime juice ?: strained/,
      /Method shake/,
      /Shake hard\./,
      /Final ABV 17\.2 %/,
      /Contains eggs/,
      /Not reviewed House vermouth/,
      /Version 2 is locked now\. Signing this one retires it\./,
      /The drink is 12 ml more than the glass holds\./,
    ]) {
      expect(words).toMatch(part);
    }
  });

  it('cannot be signed before the signer has confirmed', async () => {
    const { dialog, wrapper } = await openDialog();
    const sign = byRole<HTMLButtonElement>(dialog, 'button', 'Sign and lock');
    expect(sign.disabled).toBe(true);
    sign.click();
    await flushPromises();
    expect(wrapper.emitted('sign')).toBeUndefined();

    byRole(dialog, 'checkbox', /^I, Menu writer, have read/).click();
    await flushPromises();
    expect(sign.disabled).toBe(false);
    sign.click();
    await flushPromises();
    expect(wrapper.emitted('sign')).toHaveLength(1);
  });
});
