import { mount } from '@vue/test-utils';
import { describe, expect, it } from 'vitest';

import type { IngredientImportPreview } from '#shared/contracts/ingredient.ts';
import ImportMapping from '#src/components/ingredients/ImportMapping.vue';
import ImportRows from '#src/components/ingredients/ImportRows.vue';
import { checkedRows, fileErrors } from '#src/composables/ingredients/import-words.ts';
import { allByRole, byRole, textOf } from '#tests/support/by-role.ts';

const preview: IngredientImportPreview = {
  headings: ['Bottle', 'Strength', 'Shelf'],
  mapping: { name: 0, abv_percent: 1 } as IngredientImportPreview['mapping'],
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

describe('the preview of an import', () => {
  const rows = () => {
    const wrapper = mount(ImportRows, { props: { rows: checkedRows(preview) } });
    return allByRole(wrapper.element, 'row').slice(1).map(textOf);
  };

  it('puts the refused rows first, with an error for each field', () => {
    const [first] = rows();
    expect(first).toContain('refused Plum brandy');
    expect(first).toContain('abv_percent “150” must be from 0 to 100');
    expect(first).toContain('category “schnaps” is not a category');
  });

  it('says in words what happens to every other row', () => {
    expect(rows().slice(1)).toEqual(['2 + new Quince liqueur nothing', '4 = same Dry gin nothing']);
  });

  it('keeps errors that belong to no row', () => {
    expect(fileErrors(preview).map((error) => error.detail)).toEqual(['a quote is not closed']);
  });
});

describe('the mapping of columns', () => {
  it('shows which column of the file feeds ours, and which columns are not read', () => {
    const wrapper = mount(ImportMapping, {
      props: { headings: preview.headings, mapping: preview.mapping, disabled: false },
    });
    expect(byRole<HTMLSelectElement>(wrapper.element, 'combobox', /^abv \[%\]/).value).toBe('1');
    expect(wrapper.text()).toContain('Not read: Shelf.');
  });

  it('asks for a new preview with the column chosen, or without it', async () => {
    const wrapper = mount(ImportMapping, {
      props: { headings: preview.headings, mapping: preview.mapping, disabled: false },
    });
    await wrapper.find('select').setValue('2');
    expect(wrapper.emitted('change')?.[0]).toEqual([{ name: 2, abv_percent: 1 }]);
    await wrapper.find('select').setValue('');
    expect(wrapper.emitted('change')?.[1]).toEqual([{ abv_percent: 1 }]);
  });
});
