import { randomUUID } from 'node:crypto';

import type { EntityManager, MikroORM } from '@mikro-orm/postgresql';

import type { DraftBody } from '#shared/contracts/spec.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';

import type { ActingContext } from '../http/route.ts';
import { User } from '../modules/accounts/account.entity.ts';
import { hashPassword } from '../modules/accounts/index.ts';
import { Glass } from '../modules/glasses/glass.entity.ts';
import { Ingredient } from '../modules/ingredients/ingredient.entity.ts';
import { addIngredient } from '../modules/ingredients/index.ts';
import {
  addNote,
  branchSpec,
  changeState,
  createSpec,
  lockVersion,
  putDraft,
  readSpec,
  saveVersion,
} from '../modules/specs/index.ts';
import { createTeam } from '../modules/teams/index.ts';
import { Membership, type Team } from '../modules/teams/team.entity.ts';
import { DEMO_PEOPLE, type DemoPersonKey } from './seed/people.ts';
import { DEMO_PACKS, DEMO_PREPS } from './seed/preps.ts';
import { DEMO_SERVES, type DemoServe, type DemoVersion, KIOSK_SERVES } from './seed/serves.ts';

/** Who can sign in to the demo, one per role. */
export const DEMO_SIGN_INS = Object.values(DEMO_PEOPLE);

const HOUR_MS = 3_600_000;
const STORY_HOURS = 24 * 20;
const STEP_HOURS = 9;

export async function isEmpty(orm: MikroORM): Promise<boolean> {
  return (await orm.em.fork().count(User)) === 0;
}

/** Any number, so long as every server asks for the same one. */
const SEED_LOCK = 20_261_202;

/**
 * Loads the invented team of the Gannet Room, and a second team that its developer also belongs to: all or nothing, and nothing
 * when there is anybody already. Servers that start together wait for each other, and one of them loads it.
 */
export async function seedDemo(orm: MikroORM): Promise<void> {
  await orm.em.fork().transactional(async (transaction) => {
    const em = transaction;
    await em.execute('select pg_advisory_xact_lock(?)', [SEED_LOCK]);
    if ((await em.count(User)) > 0) return;
    const start = new Date(Date.now() - STORY_HOURS * HOUR_MS);
    const people = await addPeople(em);
    const { gannetRoom, kiosk } = await addTeams(em, { people, start });
    const story = new DemoStory(em, { team: gannetRoom, people, start });
    await story.stockShelf();
    for (const serve of DEMO_SERVES) await story.tell(serve);
    const sideStory = new DemoStory(em, { team: kiosk, people, start });
    for (const serve of KIOSK_SERVES) await sideStory.tell(serve);
  });
}

type People = Record<DemoPersonKey, User>;

async function addPeople(em: EntityManager): Promise<People> {
  const entries = await Promise.all(
    Object.entries(DEMO_PEOPLE).map(async ([key, { email, name, password }]) => {
      const passwordHash = await hashPassword(password);
      return [key, em.create(User, { id: randomUUID(), email, name, passwordHash })] as const;
    }),
  );
  await em.flush();
  return Object.fromEntries(entries) as People;
}

async function addTeams(em: EntityManager, { people, start }: { people: People; start: Date }) {
  const settings = { country: 'GB', currency: 'GBP' } as const;
  const gannetRoom = createTeam(em, { name: 'The Gannet Room', creator: people.manager, at: start });
  em.assign(gannetRoom, settings);
  for (const [key, { roles }] of Object.entries(DEMO_PEOPLE)) {
    const user = people[key as DemoPersonKey];
    if (user !== people.manager) em.create(Membership, { team: gannetRoom, user, roles: [...roles] });
  }
  const kiosk = createTeam(em, { name: 'Ferry Stage Kiosk', creator: people.developer, at: start });
  em.assign(kiosk, settings);
  await em.flush();
  em.clear();
  return { gannetRoom, kiosk };
}

/** Tells what the team did, step by step, through the same use cases as the API, on a clock of the last weeks. */
class DemoStory {
  readonly #em: EntityManager;
  readonly #team: Team;
  readonly #people: People;
  readonly #start: Date;
  #hours = 0;

  constructor(em: EntityManager, { team, people, start }: { team: Team; people: People; start: Date }) {
    this.#em = em;
    this.#team = team;
    this.#people = people;
    this.#start = start;
  }

  async stockShelf(): Promise<void> {
    for (const prep of DEMO_PREPS) await addIngredient(this.#as('developer'), prep);
    for (const [name, pack] of Object.entries(DEMO_PACKS)) await this.#review(name, pack);
    await this.#em.flush();
    this.#em.clear();
  }

  async tell(serve: DemoServe): Promise<void> {
    const { name, description } = serve;
    const { id: specId } = await createSpec(this.#as('developer'), { name, description });
    let newest = '';
    for (const version of serve.versions) newest = await this.#save({ specId, serve, version });
    if (serve.variant === undefined) return;
    const branch = { fromVersionId: newest, variantName: serve.variant.name };
    const sibling = await branchSpec(this.#as('developer'), { specId, branch });
    await this.#save({ specId: sibling.id, serve, version: serve.variant.version });
  }

  /** Writes the draft, saves it, and adds what the team said and decided; the id of the version. */
  async #save(step: { specId: string; serve: DemoServe; version: DemoVersion }): Promise<string> {
    const { specId, serve, version } = step;
    this.#em.clear();
    const draft = await this.#draftOf(serve, version);
    const present = await putDraftAnew(this.#as('developer'), { specId, draft });
    const saved = await saveVersion(this.#as('developer'), { specId, why: version.why, ifMatch: present });
    for (const { by, note } of version.notes ?? []) {
      await addNote(this.#as(by), { versionId: saved.id, write: note });
    }
    const guard = { versionId: saved.id, ifMatch: saved.revision };
    if (version.state === 'on trial') {
      await changeState(this.#as('developer'), { ...guard, change: { state: 'on trial' } });
    }
    if (version.state === 'locked') await lockVersion(this.#as('menuWriter'), guard);
    return saved.id;
  }

  async #draftOf({ making, glass }: DemoServe, { lines }: DemoVersion): Promise<DraftBody> {
    const { id: glassId } = await this.#em.findOneOrFail(Glass, { team: this.#team.id, name: glass });
    const written = [];
    for (const [amountText, ingredient, stage = 'mix'] of lines) {
      const { id } = await this.#ingredient(ingredient);
      written.push({ id: randomUUID(), ingredientId: id, amountText, stage, note: '' });
    }
    return { ...blankDraft(), ...making, build: [...making.build], glassId, lines: written };
  }

  #ingredient(name: string): Promise<Ingredient> {
    return this.#em.findOneOrFail(Ingredient, { team: this.#team.id, name });
  }

  async #review(name: string, { sizeMl, price }: { sizeMl: number; price: string }): Promise<void> {
    const ingredient = await this.#ingredient(name);
    ingredient.allergens = { ...ingredient.allergens, reviewed: true };
    const pricedOn = this.#start.toISOString().slice(0, 10);
    ingredient.packs = [{ size: sizeMl, sizeUnit: 'ml', price, pricedOn }];
  }

  /** The context of one of the team's people, some hours after the step before. */
  #as(key: DemoPersonKey): ActingContext {
    const { id, email, name } = this.#people[key];
    const { roles } = DEMO_PEOPLE[key];
    this.#hours = Math.min(this.#hours + STEP_HOURS, STORY_HOURS);
    const at = new Date(this.#start.getTime() + this.#hours * HOUR_MS);
    return { em: this.#em, teamId: this.#team.id, person: { id, email, name }, roles, now: () => at };
  }
}

/** Replaces the draft whatever its revision, and gives the new one: nobody else writes while the demo is loaded. */
async function putDraftAnew(
  context: ActingContext,
  { specId, draft }: { specId: string; draft: DraftBody },
): Promise<number> {
  const { draftRevision } = await readSpec(context, specId);
  return (await putDraft(context, { specId, draft, ifMatch: draftRevision })).draftRevision;
}
