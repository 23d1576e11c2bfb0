import { type Ref, type ShallowRef, computed, reactive, ref, shallowRef } from 'vue';

import type { FieldError } from '#shared/contracts/problem.ts';
import type { Team, TeamUpdate } from '#shared/contracts/team.ts';
import { ApiProblem } from '#src/api/http.ts';
import { updateTeam } from '#src/api/teams.ts';
import { type Submission, useSubmission } from '#src/composables/useSubmission.ts';

type MeasureKey = keyof TeamUpdate['houseMeasures'];

export interface TeamDraft extends Omit<TeamUpdate, 'houseMeasures'> {
  /** Null while a field is empty or cannot be read. */
  houseMeasures: Record<MeasureKey, number | null>;
}

export interface TeamSettingsForm {
  draft: Ref<TeamDraft>;
  /** Which measure fields hold something that is no number. */
  unreadable: Record<MeasureKey, boolean>;
  form: Submission;
  isDirty: Ref<boolean>;
  /** What somebody else saved meanwhile. */
  theirs: ShallowRef<Team | null>;
  save: () => Promise<void>;
  takeTheirs: () => void;
}

const FIELDS = [
  '#/name',
  '#/country',
  '#/currency',
  '#/houseMeasures/dashMl',
  '#/houseMeasures/barSpoonMl',
  '#/houseMeasures/dropMl',
];

/** The settings of a team as a form. A stale save keeps what was typed and shows what was saved meanwhile. */
export function useTeamSettings(
  team: () => Team,
  tell: { saved: (team: Team) => void; taken: (team: Team) => void },
): TeamSettingsForm {
  const form = useSubmission(FIELDS);
  const based = shallowRef(team());
  const draft = ref(draftFrom(based.value));
  const unreadable = reactive({ dashMl: false, barSpoonMl: false, dropMl: false });
  const theirs = shallowRef<Team | null>(null);

  function restart(saved: Team) {
    based.value = saved;
    draft.value = draftFrom(saved);
    theirs.value = null;
    form.clear();
  }

  async function save() {
    const read = updateFrom(draft.value);
    form.refuse(read.ok ? [] : read.errors);
    if (!read.ok) return;
    await form.submit(async () => {
      const saved = await updateTeam(based.value, read.body);
      restart(saved);
      tell.saved(saved);
    });
    const failure = form.failure.value;
    if (failure instanceof ApiProblem && failure.is('stale-version')) {
      theirs.value = failure.problem.current as Team;
      based.value = theirs.value;
    }
  }

  return {
    draft,
    unreadable,
    form,
    isDirty: computed(
      () =>
        JSON.stringify(draft.value) !== JSON.stringify(draftFrom(based.value)) ||
        Object.values(unreadable).some(Boolean),
    ),
    theirs,
    save,
    takeTheirs: () => {
      if (theirs.value === null) return;
      tell.taken(theirs.value);
      restart(theirs.value);
    },
  };
}

function draftFrom({ name, country, currency, houseMeasures }: Team): TeamDraft {
  const { dashMl, barSpoonMl, dropMl } = houseMeasures;
  return { name, country, currency, houseMeasures: { dashMl, barSpoonMl, dropMl } };
}

function updateFrom(draft: TeamDraft): { ok: true; body: TeamUpdate } | { ok: false; errors: FieldError[] } {
  const { dashMl, barSpoonMl, dropMl } = draft.houseMeasures;
  const currency = draft.currency.trim().toUpperCase();
  if (dashMl !== null && barSpoonMl !== null && dropMl !== null) {
    const houseMeasures = { dashMl, barSpoonMl, dropMl };
    return { ok: true, body: { name: draft.name.trim(), country: draft.country, currency, houseMeasures } };
  }
  const errors = Object.entries(draft.houseMeasures)
    .filter(([, value]) => value === null)
    .map(([key]) => ({
      pointer: `#/houseMeasures/${key}`,
      code: 'required',
      detail: 'Write a volume within the range below the field.',
    }));
  return { ok: false, errors };
}
