import {
  INGREDIENT_CSV_COLUMNS,
  type Ingredient,
  type IngredientCsvColumn,
} from '#shared/contracts/ingredient.ts';
import { ROLES, type Role } from '#shared/contracts/roles.ts';
import type { Spec } from '#shared/contracts/spec.ts';

import { TEST_PASSWORD } from './app.ts';
import { A_GLASS, A_NOTE, AN_INGREDIENT, type TeamWorld } from './team-world.ts';

/** What the access test has to know about one route. */
export interface AccessCase {
  /** Who may call it; written down here by hand from the table of roles, not read from the route. */
  who: 'anybody' | 'the signed-in' | readonly Role[];
  /** A right body. Given another team's world, a body that names its things. */
  body?: (world: TeamWorld) => unknown;
  query?: (world: TeamWorld) => Record<string, string>;
  /** The revision that the edit is based on, or where to read it. */
  ifMatch?: number | { path: string; member: 'revision' | 'draftRevision' };
  /** Brings the team into the state that the call needs. */
  before?: (world: TeamWorld) => Promise<void>;
}

const MANAGERS = ['manager'] as const;
const MAKERS = ['manager', 'developer'] as const;
const SIGNERS = ['manager', 'menu-writer'] as const;

const TEAM = '/teams/:teamId';
const SPEC = `${TEAM}/specs/:specId`;
const VERSION = `${TEAM}/versions/:versionId`;

const FIRST = { ifMatch: 1 };
const revisionOf = (path: string) => ({ ifMatch: { path, member: 'revision' } }) as const;
const OF_INGREDIENT = revisionOf(`${TEAM}/ingredients/:ingredientId`);
const OF_SPEC = revisionOf(SPEC);
const OF_VERSION = revisionOf(VERSION);
const OF_DRAFT = { ifMatch: { path: SPEC, member: 'draftRevision' } } as const;

const CSV_ROW: Partial<Record<IngredientCsvColumn, string>> = {
  name: 'Imported rum',
  category: 'spirit',
  abv_percent: '40',
  sugar_g_per_l: '0',
  abv_known_by: 'label',
  sugar_known_by: 'estimate',
  acid_known_by: 'estimate',
};
const csv = () => ({
  csv: [INGREDIENT_CSV_COLUMNS, INGREDIENT_CSV_COLUMNS.map((column) => CSV_ROW[column] ?? '')].join('\n'),
});
const at = ({ ids }: TeamWorld, rest: string) => `/teams/${ids['teamId']}${rest}`;
const manager = ({ team }: TeamWorld) => team.as('manager');

async function retireIngredient(world: TeamWorld): Promise<void> {
  const path = at(world, `/ingredients/${world.ids['ingredientId']}`);
  const { revision } = (await manager(world).get<Ingredient>(path)).body;
  void (await manager(world).post(`${path}/retire`, undefined, { ifMatch: revision })).body;
}

async function retireGlass(world: TeamWorld): Promise<void> {
  const path = at(world, `/glasses/${world.ids['glassId']}/retire`);
  void (await manager(world).post(path, undefined, { ifMatch: 1 })).body;
}

async function retireSpec(world: TeamWorld): Promise<void> {
  const path = at(world, `/specs/${world.ids['specId']}`);
  const { revision } = (await manager(world).get<Spec>(path)).body;
  void (await manager(world).post(`${path}/retire`, undefined, { ifMatch: revision })).body;
}

async function putOnTrial(world: TeamWorld): Promise<void> {
  const path = at(world, `/versions/${world.ids['versionId']}/state`);
  void (await manager(world).post(path, { state: 'on trial' }, { ifMatch: 1 })).body;
}

async function lockVersion(world: TeamWorld): Promise<void> {
  await putOnTrial(world);
  const path = at(world, `/versions/${world.ids['versionId']}/lock`);
  void (await manager(world).post(path, { confirmed: true }, { ifMatch: 2 })).body;
}

const versionIn = (member: string) => (world: TeamWorld) => ({ [member]: world.ids['versionId'] });

/** One entry for each route, by its operationId. A route without one fails the test. */
export const ACCESS_CASES: Readonly<Record<string, AccessCase>> = {
  getHealth: { who: 'anybody' },
  getOpenApi: { who: 'anybody' },
  signUp: {
    who: 'anybody',
    body: () => ({ email: 'new@example.test', name: 'New', password: 'a long enough password' }),
  },
  signIn: {
    who: 'anybody',
    body: ({ team }) => ({ email: team.members.trainer.email, password: TEST_PASSWORD }),
  },
  signOut: { who: 'anybody' },
  getInvitation: { who: 'anybody' },

  getAccount: { who: 'the signed-in' },
  changePassword: {
    who: 'the signed-in',
    body: () => ({ currentPassword: TEST_PASSWORD, newPassword: 'a long enough password' }),
  },
  acceptInvitation: { who: 'the signed-in' },
  createTeam: { who: 'the signed-in', body: () => ({ name: 'Another' }) },

  getTeam: { who: ROLES },
  updateTeam: {
    who: MANAGERS,
    ...FIRST,
    body: () => ({
      name: 'Renamed',
      country: 'GB',
      currency: 'GBP',
      houseMeasures: { dashMl: 0.8, barSpoonMl: 5, dropMl: 0.05 },
    }),
  },
  listHistory: { who: MANAGERS },
  listMembers: { who: ROLES },
  updateMember: { who: MANAGERS, ...FIRST, body: () => ({ roles: ['trainer', 'bartender'] }) },
  removeMember: { who: MANAGERS, ...FIRST },
  listInvitations: { who: MANAGERS },
  createInvitation: { who: MANAGERS, body: () => ({ label: 'somebody', roles: ['bartender'] }) },
  withdrawInvitation: { who: MANAGERS },

  listIngredients: { who: ROLES },
  createIngredient: { who: MAKERS, body: () => ({ ...AN_INGREDIENT, name: 'Another rum' }) },
  exportIngredients: { who: MAKERS },
  previewIngredientImport: { who: MAKERS, body: csv },
  importIngredients: { who: MAKERS, body: csv },
  getIngredient: { who: ROLES },
  updateIngredient: { who: MAKERS, ...OF_INGREDIENT, body: () => ({ ...AN_INGREDIENT, note: 'changed' }) },
  retireIngredient: { who: MAKERS, ...OF_INGREDIENT },
  restoreIngredient: { who: MAKERS, ...OF_INGREDIENT, before: retireIngredient },

  listGlasses: { who: ROLES },
  createGlass: { who: MAKERS, body: () => ({ ...A_GLASS, name: 'Another coupe' }) },
  updateGlass: { who: MAKERS, ...FIRST, body: () => ({ ...A_GLASS, stemMm: 80 }) },
  retireGlass: { who: MAKERS, ...FIRST },
  restoreGlass: { who: MAKERS, ifMatch: 2, before: retireGlass },

  listSpecs: { who: ROLES },
  createSpec: { who: MAKERS, body: () => ({ name: 'Another sour' }) },
  getSpec: { who: ROLES },
  updateSpec: {
    who: MAKERS,
    ...OF_SPEC,
    body: () => ({ name: 'Renamed', variantName: null, description: '' }),
  },
  retireSpec: { who: SIGNERS, ...OF_SPEC },
  restoreSpec: { who: SIGNERS, ...OF_SPEC, before: retireSpec },
  branchSpec: {
    who: MAKERS,
    body: (world) => ({ ...versionIn('fromVersionId')(world), variantName: 'Tall' }),
  },
  putDraft: { who: MAKERS, ...OF_DRAFT, body: ({ draft }) => draft },
  startDraftFromVersion: { who: MAKERS, ...OF_DRAFT, body: versionIn('versionId') },
  saveVersion: { who: MAKERS, ...OF_DRAFT, body: () => ({ why: 'again' }) },
  listVersionsOfSpec: { who: ROLES },

  listVersions: { who: ROLES, query: ({ ids }) => ({ ids: ids['versionId'] ?? '' }) },
  getVersion: { who: ROLES },
  changeVersionState: { who: MAKERS, ...OF_VERSION, body: () => ({ state: 'on trial' }) },
  retireVersion: { who: SIGNERS, ...OF_VERSION, body: () => ({ reason: 'too sweet' }) },
  lockVersion: { who: SIGNERS, ...OF_VERSION, body: () => ({ confirmed: true }), before: putOnTrial },
  unlockVersion: {
    who: MANAGERS,
    ...OF_VERSION,
    body: () => ({ reason: 'signed too soon' }),
    before: lockVersion,
  },
  listNotes: { who: ROLES },
  addNote: { who: ROLES, body: () => A_NOTE },
  updateNote: { who: ROLES, ...FIRST, body: () => ({ ...A_NOTE, words: 'On second thought.' }) },
  deleteNote: { who: ROLES, ...FIRST },
};
