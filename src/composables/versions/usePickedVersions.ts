import { type Ref, computed, ref } from 'vue';

import { COMPARE_LIMITS, type Version } from '#shared/contracts/version.ts';
import { versionTitle } from './version-title.ts';

export interface PickedVersion {
  id: string;
  title: string;
}

export interface PickedVersions {
  picked: Ref<PickedVersion[]>;
  canPick: Ref<boolean>;
  isPicked: (versionId: string) => boolean;
  setPicked: (version: Version, isPicked: boolean) => void;
  drop: (versionId: string) => void;
}

/** The versions chosen for comparing, in the order they were chosen: the first becomes the reference. */
export function usePickedVersions(): PickedVersions {
  const picked = ref<PickedVersion[]>([]);
  const canPick = computed(() => picked.value.length < COMPARE_LIMITS.max);
  const isPicked = (versionId: string) => picked.value.some((version) => version.id === versionId);

  function drop(versionId: string) {
    picked.value = picked.value.filter((version) => version.id !== versionId);
  }

  function setPicked(version: Version, isWanted: boolean) {
    if (!isWanted) drop(version.id);
    else if (!isPicked(version.id) && canPick.value) {
      picked.value = [...picked.value, { id: version.id, title: versionTitle(version) }];
    }
  }

  return { picked, canPick, isPicked, setPicked, drop };
}
