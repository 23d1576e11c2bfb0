import { mount } from '@vue/test-utils';
import { describe, expect, it } from 'vitest';

import type { NoteWrite } from '#shared/contracts/version.ts';
import NoteForm from '#src/components/notes/NoteForm.vue';
import { allByRole, byRole, textOf, typeInto } from '#tests/support/by-role.ts';

function mountForm(note: NoteWrite | null = null) {
  const wrapper = mount(NoteForm, {
    props: { note, saving: false, problemText: null },
    attachTo: document.body,
  });
  return { wrapper, root: wrapper.element.parentElement as HTMLElement };
}

const written: NoteWrite = {
  scores: { sweet: 6, sour: null, bitter: null, strength: null, texture: null, overall: 8 },
  words: 'short finish',
};

describe('the form for a tasting note', () => {
  it('leaves every scale unscored until somebody scores it', () => {
    const { wrapper, root } = mountForm();
    expect(allByRole(root, 'slider').map((slider) => slider.getAttribute('aria-valuetext'))).toEqual(
      Array<string>(6).fill('not scored'),
    );
    wrapper.unmount();
  });

  it('saves the scores that were given and null for the rest', async () => {
    const { wrapper, root } = mountForm();
    typeInto(byRole(root, 'slider', 'Sour'), '0');
    typeInto(byRole(root, 'slider', 'Overall'), '7');
    typeInto(byRole(root, 'textbox', 'In words'), '  bright, a little thin ');
    await wrapper.find('form').trigger('submit');
    expect(wrapper.emitted('save')).toEqual([
      [
        {
          scores: { sweet: null, sour: 0, bitter: null, strength: null, texture: null, overall: 7 },
          words: 'bright, a little thin',
        },
      ],
    ]);
    wrapper.unmount();
  });

  it('takes a score back', async () => {
    const { wrapper, root } = mountForm(written);
    byRole(root, 'button', 'Leave Sweet out').click();
    await wrapper.find('form').trigger('submit');
    expect(wrapper.emitted<[NoteWrite]>('save')?.[0]?.[0].scores).toMatchObject({ sweet: null, overall: 8 });
    wrapper.unmount();
  });

  it('refuses a note that says nothing, and says why', async () => {
    const { wrapper, root } = mountForm();
    await wrapper.find('form').trigger('submit');
    expect(wrapper.emitted('save')).toBeUndefined();
    expect(textOf(byRole(root, 'alert'))).toContain('Give at least one score');
    wrapper.unmount();
  });

  it('opens an existing note with its contents', () => {
    const { wrapper, root } = mountForm(written);
    expect(byRole<HTMLTextAreaElement>(root, 'textbox', 'In words').value).toBe('short finish');
    expect(byRole(root, 'slider', 'Overall').getAttribute('aria-valuetext')).toBe('8 of 10');
    wrapper.unmount();
  });
});
