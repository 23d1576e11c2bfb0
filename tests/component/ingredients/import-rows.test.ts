import { enableAutoUnmount, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import type { IngredientImportPreview } from '#shared/contracts/ingredient.ts';
import ImportMapping from '#src/components/ingredients/ImportMapping.vue';
import ImportRows from '#src/components/ingredients/ImportRows.vue';
import { checkedRows, fileErrors } from '#src/composables/ingredients/import-words.ts';
import { allByRole, byRole, textOf } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

const page = document.body;

const preview: IngredientImportPreview = {
  headings: ['Bottle', 'Strength', 'Shelf'],
  mapping: { name: 0, abv_percent: 1 },
  rows: [
    { row: 2, action: 'create', name: 'Quince liqueur', ingredient: null },
    { row: 3, action: 'refuse', name: 'Plum brandy', ingredient: null },
    { row: 4, action: 'unchanged', name: 'Dry gin', ingredient: null },
  ],
  errors: [
    { row: 3, column: 'abv_percent', value: '150', detail: 'must be from 0 to 100' },
    { row: 3, column: 'category', value: 'schnaps', detail: 'is not a category' },
    { row: 9, column: null, value: '', detail: 'a quote is not closed' },
  ],
  counts: { create: 1, update: 0, unchanged: 1, refuse: 1 },
};

function shownRows(): string[] {
  mount(ImportRows, { props: { rows: checkedRows(preview) }, attachTo: page });
  return allByRole(page, 'row').slice(1).map(textOf);
}

describe('the preview of an import', () => {
  it('puts the refused rows first, with an error for each field', () => {
    const [first] = shownRows();
    expect(first).toMatch(/^Plum brandy .* refused/);
    expect(first).toContain('abv_percent “150” must be from 0 to 100');
    expect(first).toContain('category “schnaps” is not a category');
  });

  it('says in words what happens to every other row', () => {
    expect(shownRows().slice(1)).toEqual([
      'Quince liqueur Line 2 Action + new What is wrong nothing',
      'Dry gin Line 4 Action = same What is wrong nothing',
    ]);
  });

  it('keeps errors that belong to no row', () => {
    expect(fileErrors(preview).map((error) => error.detail)).toEqual(['a quote is not closed']);
  });
});

describe('the mapping of columns', () => {
  function mountMapping() {
    const { headings, mapping } = preview;
    return mount(ImportMapping, { props: { headings, mapping, disabled: false }, attachTo: page });
  }

  it('shows which column of the file feeds ours, and which columns are not read', () => {
    mountMapping();
    expect(byRole<HTMLSelectElement>(page, 'combobox', /^abv \[%\]/).value).toBe('1');
    expect(textOf(page)).toContain('Not read: Shelf.');
  });

  it('asks for a new preview with the column chosen, or without it', async () => {
    const wrapper = mountMapping();
    await wrapper.find('select').setValue('2');
    expect(wrapper.emitted('change')?.[0]).toEqual([{ name: 2, abv_percent: 1 }]);
    await wrapper.find('select').setValue('');
    expect(wrapper.emitted('change')?.[1]).toEqual([{ abv_percent: 1 }]);
  });
});
