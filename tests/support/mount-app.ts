import { flushPromises, mount } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { type Component, h } from 'vue';
import { type RouteRecordRaw, type Router, RouterView, createMemoryHistory, createRouter } from 'vue-router';

import ConfirmHost from '#src/components/ui/ConfirmHost.vue';
import { routes } from '#src/router/routes.ts';

/**
 * Mounts a page as the application does: with a router that knows every name the page links to, a fresh Pinia, and the
 * dialog that asks before something is done. `prepare` fills stores before the page is made.
 */
export async function mountPage(input: {
  page: Component;
  props?: Record<string, unknown>;
  path?: string;
  prepare?: () => void | Promise<void>;
}): Promise<{ router: Router; unmount: () => void }> {
  const pinia = createPinia();
  setActivePinia(pinia);
  await input.prepare?.();
  const page = { render: () => h(input.page, input.props ?? {}) };
  const router = createRouter({ history: createMemoryHistory(), routes: namedRoutes(page) });
  await router.push(input.path ?? '/page');
  const root = { render: () => [h(RouterView), h(ConfirmHost)] };
  const wrapper = mount(root, { attachTo: document.body, global: { plugins: [pinia, router] } });
  await flushPromises();
  return { router, unmount: () => wrapper.unmount() };
}

/** The application's own names and paths, each but the page's own leading to nothing. */
function namedRoutes(page: Component): RouteRecordRaw[] {
  const elsewhere = { render: () => null };
  const named = createRouter({ history: createMemoryHistory(), routes })
    .getRoutes()
    .flatMap(({ name, path }) => (name === undefined ? [] : [{ name, path, component: elsewhere }]));
  return [{ path: '/page', name: 'page', component: page }, ...named];
}
