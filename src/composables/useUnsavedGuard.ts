import { useEventListener } from '@vueuse/core';
import type { Ref } from 'vue';
import { onBeforeRouteLeave } from 'vue-router';

import { useConfirm } from './useConfirm.ts';

/** Asks before a page with unsaved changes is left, whether by a link, the back button or by closing the tab. */
export function useUnsavedGuard(isDirty: Readonly<Ref<boolean>>): void {
  const { confirm } = useConfirm();

  useEventListener(window, 'beforeunload', (event) => {
    if (isDirty.value) event.preventDefault();
  });

  onBeforeRouteLeave(async () => {
    if (!isDirty.value) return true;
    return await confirm({
      title: 'Leave without saving?',
      detail: 'What you changed on this page has not been saved and will be lost.',
      confirmLabel: 'Leave',
      cancelLabel: 'Stay here',
    });
  });
}
