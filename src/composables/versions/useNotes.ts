import { type Ref, ref, shallowRef } from 'vue';

import type { Note, NoteWrite } from '#shared/contracts/version.ts';
import { addNote, deleteNote, listNotes, updateNote } from '#src/api/versions.ts';
import { type LoadStatus, useLoaded } from '#src/composables/useLoaded.ts';

export interface Notes {
  notes: Ref<readonly Note[] | null>;
  status: Ref<LoadStatus>;
  loadFailure: Ref<unknown>;
  reload: () => Promise<void>;
  isSaving: Ref<boolean>;
  saveFailure: Ref<unknown>;
  /** Adds the note, or saves `edited` with new contents. True when it was saved. */
  save: (contents: NoteWrite, edited: Note | null) => Promise<boolean>;
  remove: (note: Note) => Promise<boolean>;
}

/** Tasting notes of one version, newest first. */
export function useNotes(teamId: string, versionId: () => string): Notes {
  const loaded = useLoaded(async () => (await listNotes(teamId, versionId())).items);
  const isSaving = ref(false);
  const saveFailure = shallowRef<unknown>(null);

  async function change(task: () => Promise<unknown>): Promise<boolean> {
    if (isSaving.value) return false;
    isSaving.value = true;
    saveFailure.value = null;
    try {
      await task();
    } catch (error) {
      saveFailure.value = error;
      return false;
    } finally {
      isSaving.value = false;
    }
    await loaded.reload();
    return true;
  }

  return {
    notes: loaded.data,
    status: loaded.status,
    loadFailure: loaded.failure,
    reload: loaded.reload,
    isSaving,
    saveFailure,
    save: (contents, edited) =>
      change(() =>
        edited === null ? addNote(teamId, versionId(), contents) : updateNote(teamId, edited, contents),
      ),
    remove: (note) => change(() => deleteNote(teamId, note)),
  };
}
