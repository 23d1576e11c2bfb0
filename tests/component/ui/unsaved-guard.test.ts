import { flushPromises } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';
import { defineComponent, h, ref } from 'vue';

import { useUnsavedGuard } from '#src/composables/useUnsavedGuard.ts';
import { allByRole, byRole } from '#tests/support/by-role.ts';
import { mountPage } from '#tests/support/mount-app.ts';

let unmount = () => {};
afterEach(() => unmount());

async function pageThatIs(dirty: boolean) {
  const page = defineComponent({
    setup() {
      useUnsavedGuard(ref(dirty));
      return () => h('p', 'a form');
    },
  });
  const mounted = await mountPage({ page });
  unmount = mounted.unmount;
  return mounted.router;
}

async function answer(button: string) {
  byRole(document.body, 'button', button).click();
  await flushPromises();
}

describe('a page with unsaved changes', () => {
  it('is not left before the person has said so', async () => {
    const router = await pageThatIs(true);
    const leaving = router.push('/teams');
    await flushPromises();
    await answer('Stay here');
    await leaving;
    expect(router.currentRoute.value.path).toBe('/page');

    const leavingAgain = router.push('/teams');
    await flushPromises();
    await answer('Leave');
    await leavingAgain;
    expect(router.currentRoute.value.path).toBe('/teams');
  });

  it('keeps the tab from closing at once', async () => {
    await pageThatIs(true);
    const closing = new Event('beforeunload', { cancelable: true });
    window.dispatchEvent(closing);
    expect(closing.defaultPrevented).toBe(true);
  });

  it('asks nothing when all is saved', async () => {
    const router = await pageThatIs(false);
    await router.push('/teams');
    expect(router.currentRoute.value.path).toBe('/teams');
    expect(allByRole(document.body, 'dialog')).toHaveLength(0);
  });
});
