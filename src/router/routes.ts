import type { RouteLocationRaw, RouteRecordRaw } from 'vue-router';

import { usePreferencesStore } from '#src/stores/preferences.ts';
import { useSessionStore } from '#src/stores/session.ts';
import { localPath } from './local-path.ts';

declare module 'vue-router' {
  interface RouteMeta {
    /** Title of the browser's tab. */
    title?: string;
    /** Who may open it: everybody, or only somebody signed in (the default). */
    access?: 'public';
  }
}

/** Pages before signing in. */
const publicRoutes: RouteRecordRaw = {
  path: '/',
  component: () => import('#src/layouts/PlainLayout.vue'),
  meta: { access: 'public' },
  children: [
    {
      path: 'sign-in',
      name: 'sign-in',
      component: () => import('#src/pages/account/SignInPage.vue'),
      props: (route) => ({ returnTo: localPath(route.query['return']) }),
      meta: { title: 'Sign in' },
    },
    {
      path: 'sign-up',
      name: 'sign-up',
      component: () => import('#src/pages/account/SignUpPage.vue'),
      props: (route) => ({ returnTo: localPath(route.query['return']) }),
      meta: { title: 'Sign up' },
    },
    {
      path: 'invitation/:token',
      name: 'invitation',
      component: () => import('#src/pages/account/InvitationPage.vue'),
      props: true,
      meta: { title: 'Invitation' },
    },
  ],
};

/** Pages of a person, outside any team. */
const personRoutes: RouteRecordRaw = {
  path: '/',
  component: () => import('#src/layouts/AppLayout.vue'),
  children: [
    {
      path: '',
      name: 'home',
      component: () => import('#src/pages/account/TeamChoicePage.vue'),
      beforeEnter: toLastTeam,
    },
    {
      path: 'teams',
      name: 'teams',
      component: () => import('#src/pages/account/TeamChoicePage.vue'),
      meta: { title: 'Teams' },
    },
    {
      path: 'account',
      name: 'account',
      component: () => import('#src/pages/account/AccountPage.vue'),
      meta: { title: 'Account' },
    },
  ],
};

/** Pages of one team. Every page gets `teamId`, and what else its path names, as props. */
const teamRoutes: RouteRecordRaw = {
  path: '/t/:teamId',
  component: () => import('#src/layouts/TeamLayout.vue'),
  props: true,
  redirect: (to) => ({ name: 'specs', params: to.params }),
  children: [
    {
      path: 'specs',
      name: 'specs',
      component: () => import('#src/pages/specs/SpecListPage.vue'),
      props: true,
      meta: { title: 'Specs' },
    },
    {
      path: 'specs/:specId',
      name: 'spec',
      component: () => import('#src/pages/specs/SpecEditorPage.vue'),
      props: true,
      meta: { title: 'Bench' },
    },
    {
      path: 'specs/:specId/versions',
      name: 'spec-versions',
      component: () => import('#src/pages/specs/SpecVersionsPage.vue'),
      props: true,
      meta: { title: 'Versions' },
    },
    {
      path: 'versions/:versionId',
      name: 'version',
      component: () => import('#src/pages/specs/VersionPage.vue'),
      props: true,
      meta: { title: 'Version' },
    },
    {
      path: 'compare',
      name: 'compare',
      component: () => import('#src/pages/specs/ComparePage.vue'),
      props: (route) => ({
        teamId: route.params['teamId'],
        versionIds: wordsOf(route.query['v']),
      }),
      meta: { title: 'Compare' },
    },
    {
      path: 'ingredients',
      name: 'ingredients',
      component: () => import('#src/pages/ingredients/IngredientListPage.vue'),
      props: true,
      meta: { title: 'Ingredients' },
    },
    {
      path: 'ingredients/import',
      name: 'ingredient-import',
      component: () => import('#src/pages/ingredients/IngredientImportPage.vue'),
      props: true,
      meta: { title: 'Import ingredients' },
    },
    {
      path: 'ingredients/new',
      name: 'ingredient-new',
      component: () => import('#src/pages/ingredients/IngredientPage.vue'),
      props: (route) => ({ teamId: route.params['teamId'], ingredientId: null }),
      meta: { title: 'New ingredient' },
    },
    {
      path: 'ingredients/:ingredientId',
      name: 'ingredient',
      component: () => import('#src/pages/ingredients/IngredientPage.vue'),
      props: true,
      meta: { title: 'Ingredient' },
    },
    {
      path: 'glasses',
      name: 'glasses',
      component: () => import('#src/pages/glasses/GlassListPage.vue'),
      props: true,
      meta: { title: 'Glasses' },
    },
    {
      path: 'team',
      name: 'team',
      component: () => import('#src/pages/team/TeamPage.vue'),
      props: true,
      meta: { title: 'Team' },
    },
    {
      path: 'history',
      name: 'history',
      component: () => import('#src/pages/team/HistoryPage.vue'),
      props: true,
      meta: { title: 'History' },
    },
  ],
};

/** The start page stands before the pages with no path of their own, which would otherwise answer to `/` too. */
export const routes: RouteRecordRaw[] = [
  personRoutes,
  publicRoutes,
  teamRoutes,
  {
    path: '/:path(.*)*',
    name: 'not-found',
    component: () => import('#src/pages/system/NotFoundPage.vue'),
    meta: { title: 'Not found', access: 'public' },
  },
];

/** The start page is the team that was open last, or the only one there is. */
function toLastTeam(): RouteLocationRaw | true {
  const { teams } = useSessionStore();
  const { lastTeamId } = usePreferencesStore();
  const team =
    teams.find(({ teamId }) => teamId === lastTeamId) ?? (teams.length === 1 ? teams[0] : undefined);
  return team === undefined ? true : { name: 'specs', params: { teamId: team.teamId } };
}

function wordsOf(value: unknown): string[] {
  return typeof value === 'string' ? value.split(',').filter((word) => word !== '') : [];
}
