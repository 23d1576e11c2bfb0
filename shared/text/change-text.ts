/**
 * Sentences about change, in plain text: they are stored with a version and read in lists.
 */

/** `22.5 → 20 ml`, or `2 dashes → 1 ml` where the units differ. */
export function changeText(input: {
  readonly from: string;
  readonly to: string;
  readonly fromUnit?: string;
  readonly toUnit?: string;
}): string {
  const { from, to, fromUnit = '', toUnit = '' } = input;
  const start = fromUnit === toUnit ? from : withUnit(from, fromUnit);
  return `${start} → ${withUnit(to, toUnit)}`;
}

function withUnit(text: string, unit: string): string {
  return unit === '' ? text : `${text} ${unit}`;
}

/** Longest piece of a person's own words that a sentence repeats. */
const MAX_QUOTED_CHARACTERS = 80;

/** A person's own words in quotation marks, on one line, cut when they are long. */
export function quoted(words: string): string {
  const line = words.replace(/\s+/g, ' ').trim();
  const characters = [...line];
  if (characters.length <= MAX_QUOTED_CHARACTERS) return `“${line}”`;
  return `“${characters
    .slice(0, MAX_QUOTED_CHARACTERS - 1)
    .join('')
    .trimEnd()}…”`;
}

/** What became of a text that may be empty: added, removed or changed; undefined when nothing did. */
export function describeTextChange(input: {
  readonly subject: string;
  readonly from: string;
  readonly to: string;
}): string | undefined {
  const { subject } = input;
  const [from, to] = [input.from.trim(), input.to.trim()];
  if (from === to) return undefined;
  if (from === '') return `${subject} added: ${quoted(to)}`;
  if (to === '') return `${subject} removed: ${quoted(from)}`;
  return `${subject} ${changeText({ from: quoted(from), to: quoted(to) })}`;
}
