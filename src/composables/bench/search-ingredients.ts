/** Finds an ingredient from what somebody types: by the start of its words first, with a slip of the finger last. */

export interface Searchable {
  readonly id: string;
  readonly name: string;
  readonly category: string;
}

/** How well a name fits, best first. */
const RANKS = ['exact', 'name-start', 'word-starts', 'inside', 'category', 'slip'] as const;
type Rank = (typeof RANKS)[number];

export const SEARCH_LIMIT = 8;
/** Shorter words allow no slip: everything would fit. */
const SHORTEST_WITH_SLIP = 4;

/** Lower case, without accents and punctuation. */
export function plainName(text: string): string {
  return text
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}%]+/gu, ' ')
    .trim();
}

/**
 * Ingredients that fit a text, the best first; all of them for an empty one.
 *
 * @param input.items   in the order to keep among equals, such as by name
 * @param input.text    as typed
 * @param input.limit   most results
 */
export function searchIngredients<Item extends Searchable>(input: {
  readonly items: readonly Item[];
  readonly text: string;
  readonly limit?: number;
}): Item[] {
  const { items, limit = SEARCH_LIMIT } = input;
  const wanted = plainName(input.text);
  if (wanted === '') return items.slice(0, limit);
  const ranked = items.flatMap((item) => {
    const rank = rankOf({ item, wanted });
    return rank === undefined ? [] : [{ item, rank: RANKS.indexOf(rank) }];
  });
  return ranked
    .sort((a, b) => a.rank - b.rank || a.item.name.length - b.item.name.length)
    .slice(0, limit)
    .map(({ item }) => item);
}

/** The ingredient that a text surely means; undefined when it could be another. */
export function meantIngredient<Item extends Searchable>(input: {
  readonly items: readonly Item[];
  readonly text: string;
}): Item | undefined {
  const wanted = plainName(input.text);
  if (wanted === '') return undefined;
  const [best] = searchIngredients({ items: input.items, text: input.text, limit: 1 });
  if (best === undefined) return undefined;
  const rank = rankOf({ item: best, wanted });
  return rank === 'category' ? undefined : best;
}

function rankOf(input: { item: Searchable; wanted: string }): Rank | undefined {
  const { item, wanted } = input;
  const name = plainName(item.name);
  if (name === wanted) return 'exact';
  if (name.startsWith(wanted)) return 'name-start';
  const words = name.split(' ');
  const wantedWords = wanted.split(' ');
  if (wantedWords.every((part) => words.some((word) => word.startsWith(part)))) return 'word-starts';
  if (name.includes(wanted)) return 'inside';
  if (plainName(item.category).startsWith(wanted)) return 'category';
  const fits = (part: string): boolean => words.some((word) => word.startsWith(part) || isSlipOf(part, word));
  return wantedWords.every(fits) ? 'slip' : undefined;
}

/** Whether a typed word is one slip away from the start of a name's word. */
function isSlipOf(typed: string, word: string): boolean {
  if (typed.length < SHORTEST_WITH_SLIP) return false;
  const starts = [typed.length - 1, typed.length, typed.length + 1].map((length) => word.slice(0, length));
  return starts.some((start) => isOneSlip(typed, start));
}

/** One letter more, less, other, or two changed over. */
function isOneSlip(one: string, other: string): boolean {
  if (Math.abs(one.length - other.length) > 1) return false;
  let start = 0;
  while (start < one.length && one[start] === other[start]) start += 1;
  const tail = (text: string, skip: number): string => text.slice(start + skip);
  return (
    tail(one, 1) === tail(other, 1) ||
    tail(one, 1) === tail(other, 0) ||
    tail(one, 0) === tail(other, 1) ||
    (one[start] === other[start + 1] && one[start + 1] === other[start] && tail(one, 2) === tail(other, 2))
  );
}
