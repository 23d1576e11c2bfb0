import { enableAutoUnmount, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import CompareTable from '#src/components/compare/CompareTable.vue';
import {
  type CompareSection,
  compareRow,
  onlyDifferences,
  withColumns,
} from '#src/composables/versions/compare-table.ts';
import { allByRole, byRole, textOf } from '#tests/support/by-role.ts';

const sections: CompareSection[] = [
  {
    title: 'Lines',
    rows: [
      compareRow({
        key: 'gin',
        label: 'Dry gin',
        cells: [
          { text: '60 ml', detail: null, standing: 'reference', difference: null },
          { text: '60 ml', detail: null, standing: 'same', difference: null },
          { text: '60 ml', detail: null, standing: 'same', difference: null },
        ],
      }),
      compareRow({
        key: 'lime',
        label: 'Lime juice',
        cells: [
          { text: '22.5 ml', detail: null, standing: 'reference', difference: null },
          { text: '20 ml', detail: null, standing: 'less', difference: '2.5 ml less' },
          { text: null, detail: null, standing: 'left out', difference: null },
        ],
      }),
    ],
  },
];
const columns = ['v1', 'v2', 'v3'].map((title) => ({ versionId: title, title }));
const page = document.body;
enableAutoUnmount(afterEach);

function mountTable(shown = sections): void {
  mount(CompareTable, { props: { caption: 'Versions', columns, sections: shown }, attachTo: page });
}

describe('the table of differences', () => {
  it('marks a difference in words and by a sign, not by colour alone', () => {
    mountTable();
    const lime = allByRole(page, 'row')
      .map(textOf)
      .find((row) => row.startsWith('Lime juice'));
    expect(lime).toBe('Lime juice ≠ differs 22.5 ml 20 ml ▼ 2.5 ml less – none − left out');
  });

  it('does not mark a row that is the same in every version', () => {
    mountTable();
    const head = byRole(page, 'rowheader', 'Dry gin');
    expect(textOf(head)).not.toContain('differs');
  });

  it('can be narrowed to the rows that differ', () => {
    mountTable(onlyDifferences(sections));
    const heads = allByRole(page, 'rowheader').map(textOf);
    expect(heads).toEqual(['Lime juice ≠ differs']);
  });

  it('keeps two columns where no more fit, and judges the row by what is shown', () => {
    const narrowed = withColumns(
      [
        {
          title: 'Lines',
          rows: [
            compareRow({
              key: 'top',
              label: 'Soda',
              cells: [
                { text: '60 ml', detail: null, standing: 'reference', difference: null },
                { text: '60 ml', detail: null, standing: 'same', difference: null },
                { text: null, detail: null, standing: 'left out', difference: null },
              ],
            }),
          ],
        },
      ],
      [0, 1],
    );
    expect(narrowed[0]?.rows[0]).toMatchObject({ differs: false });
    expect(narrowed[0]?.rows[0]?.cells).toHaveLength(2);
  });
});
