/** How a value stands against the reference version. Each has a sign of its own, so colour is never needed. */
export const STANDINGS = {
  /** Shown, but not judged against the reference. */
  none: { sign: '', words: '' },
  reference: { sign: '', words: '' },
  same: { sign: '=', words: 'same' },
  more: { sign: '▲', words: 'more' },
  less: { sign: '▼', words: 'less' },
  differs: { sign: '≠', words: 'differs' },
  added: { sign: '+', words: 'added' },
  'left out': { sign: '−', words: 'left out' },
} as const;
export type Standing = keyof typeof STANDINGS;

export interface CompareCell {
  /** The value in words; null where the version has none. */
  text: string | null;
  /** A second, quieter line, such as a line's note. */
  detail: string | null;
  standing: Standing;
  /** By how much, such as `2.5 ml more`; null where the sign says it all. */
  difference: string | null;
}

export interface CompareRow {
  key: string;
  label: string;
  /** One cell a version, in the order of the columns. */
  cells: CompareCell[];
  /** Whether any version stands otherwise than the reference. */
  differs: boolean;
}

export interface CompareSection {
  title: string;
  rows: CompareRow[];
}

export function isDifferent(standing: Standing): boolean {
  return isJudged(standing) && standing !== 'same';
}

/** Whether the cell stands against the reference at all. */
export function isJudged(standing: Standing): boolean {
  return standing !== 'none' && standing !== 'reference';
}

/** A row whose `differs` follows from its cells. */
export function compareRow(input: Omit<CompareRow, 'differs'>): CompareRow {
  return { ...input, differs: input.cells.some((cell) => isDifferent(cell.standing)) };
}

/** Keeps the columns asked for, for a screen that holds fewer than all. */
export function withColumns(
  sections: readonly CompareSection[],
  columns: readonly number[],
): CompareSection[] {
  return sections.map((section) => ({
    title: section.title,
    rows: section.rows.map((row) =>
      compareRow({
        key: row.key,
        label: row.label,
        cells: columns.map((column) => row.cells[column]).filter((cell) => cell !== undefined),
      }),
    ),
  }));
}

/** Keeps the rows that differ, and the sections that still have any. */
export function onlyDifferences(sections: readonly CompareSection[]): CompareSection[] {
  return sections
    .map((section) => ({ title: section.title, rows: section.rows.filter((row) => row.differs) }))
    .filter((section) => section.rows.length > 0);
}
