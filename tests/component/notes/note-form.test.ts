import { enableAutoUnmount, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import type { NoteWrite } from '#shared/contracts/version.ts';
import NoteForm from '#src/components/notes/NoteForm.vue';
import { allByRole, byRole, textOf, typeInto } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

const page = document.body;

function mountForm(note: NoteWrite | null = null) {
  return mount(NoteForm, { props: { note, saving: false, failure: null }, attachTo: page });
}

const written: NoteWrite = {
  scores: { sweet: 6, sour: null, bitter: null, strength: null, texture: null, overall: 8 },
  words: 'short finish',
};

describe('the form for a tasting note', () => {
  it('leaves every scale unscored until somebody scores it', () => {
    mountForm();
    expect(allByRole(page, 'slider').map((slider) => slider.getAttribute('aria-valuetext'))).toEqual(
      Array<string>(6).fill('not scored'),
    );
  });

  it('saves the scores that were given and null for the rest', async () => {
    const wrapper = mountForm();
    typeInto(byRole(page, 'slider', 'Sour'), '0');
    typeInto(byRole(page, 'slider', 'Overall'), '7');
    typeInto(byRole(page, 'textbox', 'In words'), '  bright, a little thin ');
    await wrapper.find('form').trigger('submit');
    expect(wrapper.emitted('save')).toEqual([
      [
        {
          scores: { sweet: null, sour: 0, bitter: null, strength: null, texture: null, overall: 7 },
          words: 'bright, a little thin',
        },
      ],
    ]);
  });

  it('takes a score back', async () => {
    const wrapper = mountForm(written);
    byRole(page, 'button', 'Leave Sweet out').click();
    await wrapper.find('form').trigger('submit');
    expect(wrapper.emitted<[NoteWrite]>('save')?.[0]?.[0].scores).toMatchObject({ sweet: null, overall: 8 });
  });

  it('refuses a note that says nothing, and says why', async () => {
    const wrapper = mountForm();
    await wrapper.find('form').trigger('submit');
    expect(wrapper.emitted('save')).toBeUndefined();
    expect(textOf(byRole(page, 'alert'))).toContain('Give at least one score');
  });

  it('opens an existing note with its contents', () => {
    mountForm(written);
    expect(byRole<HTMLTextAreaElement>(page, 'textbox', 'In words').value).toBe('short finish');
    expect(byRole(page, 'slider', 'Overall').getAttribute('aria-valuetext')).toBe('8 of 10');
  });
});
