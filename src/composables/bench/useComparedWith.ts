import { type ComputedRef, type Ref, computed, ref } from 'vue';

import type { Figures, Version } from '#shared/contracts/version.ts';
import { publishedReferences } from './published-references.ts';

export interface CompareChoice {
  readonly key: string;
  readonly label: string;
  readonly group: 'versions' | 'published';
}

export interface ComparedWith {
  readonly key: string;
  readonly name: string;
  /** Where its figures come from. */
  readonly source: string;
  readonly figures: Figures;
}

export interface Comparing {
  chosenKey: Ref<string | null>;
  choices: ComputedRef<readonly CompareChoice[]>;
  comparedWith: ComputedRef<ComparedWith | null>;
}

/** What the draft is compared with while it is edited: an earlier version, or a published drink. */
export function useComparedWith(versions: Readonly<Ref<readonly Version[]>>): Comparing {
  const chosenKey = ref<string | null>(null);
  const all = computed<(ComparedWith & Pick<CompareChoice, 'group'>)[]>(() => [
    ...versions.value.map((version) => ({
      key: version.id,
      group: 'versions' as const,
      name: `version ${version.number}`,
      source: version.why,
      figures: version.figures,
    })),
    ...publishedReferences().map((drink) => ({
      key: `published-${drink.key}`,
      group: 'published' as const,
      name: drink.name,
      source: `${drink.source}; worked out here from its lines`,
      figures: drink.figures,
    })),
  ]);
  return {
    chosenKey,
    choices: computed(() => all.value.map(({ key, name, group }) => ({ key, label: name, group }))),
    comparedWith: computed(() => all.value.find(({ key }) => key === chosenKey.value) ?? null),
  };
}
