import { enableAutoUnmount, flushPromises, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import ConflictPanel from '#src/components/ingredients/ConflictPanel.vue';
import { conflictRows, mergeDrafts } from '#src/composables/ingredients/conflict.ts';
import { type IngredientDraft, emptyIngredientDraft } from '#src/composables/ingredients/ingredient-draft.ts';
import { allByRole, byRole, textOf } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

const page = document.body;

function aDraft(part: Partial<IngredientDraft>): IngredientDraft {
  return { ...emptyIngredientDraft(), name: 'Lime juice', category: 'juice', ...part };
}

const mine = aDraft({ abvPercentText: '1', note: 'pressed at noon' });
const theirs = aDraft({ abvPercentText: '0', note: '' });

function mountPanel() {
  return mount(ConflictPanel, {
    props: { rows: conflictRows(mine, theirs), saving: false },
    attachTo: page,
  });
}

describe('two people saving the same ingredient', () => {
  it('shows both states of each part that differs, and only those', () => {
    mountPanel();
    const rows = allByRole(page, 'row').slice(1).map(textOf);
    expect(rows).toEqual(['Alcohol 1 % 0 %', 'Note pressed at noon empty']);
  });

  it('keeps the writer’s state unless told otherwise, part by part', async () => {
    const wrapper = mountPanel();
    byRole(page, 'button', 'Save this choice').click();
    byRole(page, 'radio', '0 %').click();
    await flushPromises();
    byRole(page, 'button', 'Save this choice').click();
    expect(wrapper.emitted('resolve')).toEqual([[[]], [['abvPercentText']]]);
  });

  it('merges what was chosen', () => {
    const merged = mergeDrafts({ mine, theirs, takeTheirs: ['abvPercentText'] });
    expect(merged).toMatchObject({ abvPercentText: '0', note: 'pressed at noon' });
  });
});
