import { randomUUID } from 'node:crypto';

import type { MikroORM } from '@mikro-orm/postgresql';

import { blankDraft } from '#shared/specs/blank-draft.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';

import { User } from '#server/modules/accounts/account.entity.ts';
import { Membership, Team } from '#server/modules/teams/team.entity.ts';

/** How many specs the team of the bench has; another team has as many. */
export const SPEC_COUNT = 20_000;

/** Three words name a drink: enough of them for 20,000 names, few enough that each is in many. */
const FIRST = ['Harbour', 'Slack', 'Long', 'Small', 'Salt', 'Copper', 'Winter', 'Quiet', 'Amber', 'North'];
const SECOND = ['Light', 'Water', 'Ebb', 'Hours', 'Orchard', 'Lantern', 'Thistle', 'Ferry', 'Garden', 'Bell'];
const THIRD = ['Sour', 'Fizz', 'Cup', 'Cobbler', 'Julep', 'Punch', 'Smash', 'Sling', 'Flip', 'Highball'];

export interface ManySpecs {
  teamId: string;
  personId: string;
}

/** Writes two teams with 20,000 specs each, drafts of six lines in them, and gives the one that is asked. */
export async function fillWithSpecs(orm: MikroORM): Promise<ManySpecs> {
  const em = orm.em.fork();
  const personId = randomUUID();
  await em.insert(User, { id: personId, email: 'bench@example.test', name: 'Bench', passwordHash: 'none' });
  const teamIds = [randomUUID(), randomUUID()] as const;
  for (const id of teamIds) {
    const settings = { country: 'GB', currency: 'GBP', houseMeasures: DEFAULT_HOUSE_MEASURES } as const;
    await em.insert(Team, { id, name: 'The Gannet Room', ...settings });
    await em.insert(Membership, { id: randomUUID(), team: id, user: personId, roles: ['developer'] });
    await insertSpecs(orm, { teamId: id, personId });
  }
  await orm.em.getConnection().execute('analyze');
  return { teamId: teamIds[0], personId };
}

async function insertSpecs(orm: MikroORM, { teamId, personId }: ManySpecs): Promise<void> {
  await orm.em.getConnection().execute(
    `insert into spec (team_id, family_id, name, variant_name, description, draft, latest_version_id, latest_number,
       latest_state, final_ml, abv_fraction, sugar_g_per_l, acid_citric_g_per_l, created_at, updated_at, updated_by_id)
     select ?, gen_random_uuid(),
       (string_to_array(?, ','))[1 + n % 10] || ' ' || (string_to_array(?, ','))[1 + n / 10 % 10] || ' ' || (string_to_array(?, ','))[1 + n / 100 % 10] || ' ' || n,
       case when n % 20 = 0 then 'winter' end, 'for the terrace', ?::jsonb, gen_random_uuid(), 1 + n % 9,
       (array['draft', 'on trial', 'locked', 'retired'])[1 + n % 4], 90 + n % 120, (n * 7919 % 4000) / 10000.0,
       n % 150, n % 12, moment, moment, ?
     from (select n, date_trunc('milliseconds', now() - make_interval(secs => n * 7919 % 20000 * 60)) as moment
       from generate_series(1, ?) as n) as numbered`,
    [
      teamId,
      FIRST.join(),
      SECOND.join(),
      THIRD.join(),
      JSON.stringify(aDraftOfSixLines()),
      personId,
      SPEC_COUNT,
    ],
  );
}

function aDraftOfSixLines() {
  const line = () => ({
    id: randomUUID(),
    ingredientId: randomUUID(),
    amountText: '22.5 ml',
    stage: 'mix',
    note: '',
  });
  const build = [
    'Measure everything into the tin.',
    'Shake hard on cubes.',
    'Strain twice into a cold glass.',
  ];
  return { ...blankDraft(), lines: Array.from({ length: 6 }, line), build, garnish: 'lime wheel' };
}
