import { describe, expect, it } from 'vitest';

import {
  columnsOfTable,
  readReferenceSource,
  readReferenceTable,
  referenceSourceNames,
  referenceTableNames,
} from '#tests/support/reference-table.ts';

describe('reference tables', () => {
  it('come in pairs of numbers and source', () => {
    expect(referenceTableNames()).toEqual(referenceSourceNames());
    expect(referenceTableNames().length).toBeGreaterThan(20);
  });

  it.each(referenceTableNames())('%s says where its numbers come from and how closely they bind', (name) => {
    const source = readReferenceSource(name);
    expect(source.id).toBe(name);
    for (const text of [source.title, source.status, source.licence, source.typedBy, source.checkedBy]) {
      expect(text).not.toBe('');
    }
    expect(source.tolerance.why).not.toBe('');
    expect(source.tolerance.value).toBeGreaterThanOrEqual(0);
    expect(Object.keys(source.columns)).toEqual(columnsOfTable(name));
  });

  it.each(referenceTableNames())('%s has rows, and a cell for every column', (name) => {
    const { rows } = readReferenceTable(name);
    expect(rows.length).toBeGreaterThan(1);
    for (const row of rows) expect(row.label.split(',')).toHaveLength(columnsOfTable(name).length);
  });
});
