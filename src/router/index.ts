import { type Router, createRouter, createWebHistory } from 'vue-router';

import { onSignedOut } from '#src/api/http.ts';
import { useSessionStore } from '#src/stores/session.ts';
import { routes } from './routes.ts';

/** The router, with the guard that asks who is signed in and takes strangers to the sign-in page and back. */
export function createAppRouter(): Router {
  const router = createRouter({
    history: createWebHistory(),
    routes,
    scrollBehavior: (to, from, saved) => saved ?? (to.path === from.path ? false : { top: 0 }),
  });

  router.beforeEach(async (to) => {
    if (to.matched.some((record) => record.meta.access === 'public')) return true;
    const session = useSessionStore();
    await session.ensure();
    return session.status === 'signed-out' ? { name: 'sign-in', query: { return: to.fullPath } } : true;
  });

  router.afterEach((to) => {
    document.title = to.meta.title === undefined ? 'Oxymel' : `${to.meta.title} · Oxymel`;
  });

  onSignedOut(() => {
    useSessionStore().forget();
    const { name, fullPath } = router.currentRoute.value;
    if (name !== 'sign-in') void router.push({ name: 'sign-in', query: { return: fullPath } });
  });
  return router;
}
