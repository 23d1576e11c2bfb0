import { type ComputedRef, type Ref, computed, ref, watch } from 'vue';

import { COMPARE_LIMITS, type Note, type Version } from '#shared/contracts/version.ts';
import { listNotes, listVersionsById } from '#src/api/versions.ts';
import { type Loaded, useLoaded } from '#src/composables/useLoaded.ts';
import { usePreferencesStore } from '#src/stores/preferences.ts';
import { useTeamStore } from '#src/stores/team.ts';
import { compareSections, notesSection } from './compare-sections.ts';
import { type CompareSection, onlyDifferences, withColumns } from './compare-table.ts';

interface Compared {
  versions: Version[];
  notes: Note[][];
}

export interface Comparison extends Pick<Loaded<Compared>, 'status' | 'failure' | 'reload'> {
  versions: ComputedRef<readonly Version[]>;
  /** Which of the versions the others are compared with. */
  reference: Ref<number>;
  isOnlyDifferences: Ref<boolean>;
  /** The one beside the reference where only two columns fit. */
  beside: Ref<number>;
  /** Places of the versions that are shown, in the order of the columns. */
  columns: ComputedRef<number[]>;
  sections: ComputedRef<CompareSection[]>;
}

/** Two to four versions with their notes, and the table of their differences. */
export function useComparison(input: {
  teamId: string;
  versionIds: Readonly<Ref<readonly string[]>>;
  /** Whether the screen holds two columns only. */
  isNarrow: Readonly<Ref<boolean>>;
}): Comparison {
  const preferences = usePreferencesStore();
  const team = useTeamStore();
  const loaded = useLoaded(() => loadCompared(input.teamId, input.versionIds.value));
  const reference = ref(0);
  const beside = ref(1);
  const isOnlyDifferences = ref(false);

  watch(
    input.versionIds,
    (ids) => {
      reference.value = 0;
      beside.value = 1;
      if (isComparable(ids)) void loaded.reload();
    },
    { immediate: true },
  );
  watch(reference, (now, before) => {
    if (now === beside.value) beside.value = before;
  });

  const versions = computed(() => loaded.data.value?.versions ?? []);
  const columns = computed(() =>
    input.isNarrow.value
      ? [reference.value, beside.value]
      : [reference.value, ...versions.value.keys()].filter(
          (place, at) => at === 0 || place !== reference.value,
        ),
  );
  const sections = computed(() => {
    if (loaded.data.value === null || team.team === null) return [];
    const all = [
      ...compareSections({
        versions: versions.value,
        reference: reference.value,
        units: { volumeUnit: preferences.volumeUnit, temperatureUnit: preferences.temperatureUnit },
        place: team.team.country,
      }),
      notesSection(loaded.data.value.notes),
    ];
    const shown = withColumns(all, columns.value);
    return isOnlyDifferences.value ? onlyDifferences(shown) : shown;
  });

  return {
    versions,
    status: loaded.status,
    failure: loaded.failure,
    reload: loaded.reload,
    reference,
    isOnlyDifferences,
    beside,
    columns,
    sections,
  };
}

/** Whether so many versions can be put side by side. */
export function isComparable(versionIds: readonly string[]): boolean {
  return versionIds.length >= COMPARE_LIMITS.min && versionIds.length <= COMPARE_LIMITS.max;
}

async function loadCompared(teamId: string, versionIds: readonly string[]): Promise<Compared> {
  const { items } = await listVersionsById(teamId, versionIds);
  const notes = await Promise.all(
    items.map(async ({ id, noteCount }) => (noteCount === 0 ? [] : (await listNotes(teamId, id)).items)),
  );
  return { versions: items, notes };
}
