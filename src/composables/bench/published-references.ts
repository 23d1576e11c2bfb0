/** Published drinks as the field and the comparison show them: their lines, worked out here like any other. */
import type { Figures } from '#shared/contracts/version.ts';
import { contentsPerMl } from '#shared/physics/contents.ts';
import { PUBLISHED_DRINKS, type PublishedDrink } from '#shared/physics/data/published-drinks.ts';
import { finishedDrink } from '#shared/physics/finished-drink.ts';

export interface PublishedReference {
  readonly key: string;
  readonly name: string;
  readonly source: string;
  readonly figures: Figures;
}

/** The book does not say what its ingredients may contain, nor in which glass they were served. */
const UNKNOWN = { washLine: null, allergens: { contains: [], mayContain: [], notReviewed: [] } };

function referenceOf(drink: PublishedDrink): PublishedReference {
  const mixPortions = drink.lines.map(({ name, volumeMl, composition }) => ({
    name,
    volumeMl,
    contentsPerMl: contentsPerMl(composition),
  }));
  const { method } = drink;
  const figures = finishedDrink({ mixPortions, topPortions: [], dilution: { kind: 'published' }, method });
  return { key: drink.key, name: drink.name, source: drink.source, figures: { ...figures, ...UNKNOWN } };
}

let references: readonly PublishedReference[] | null = null;

/** Worked out on first use. */
export function publishedReferences(): readonly PublishedReference[] {
  references ??= PUBLISHED_DRINKS.map(referenceOf);
  return references;
}
