import { type Server, createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { randomUUID } from 'node:crypto';

import type { MikroORM } from '@mikro-orm/postgresql';
import { pino } from 'pino';

import { ROLES, type Role } from '#shared/contracts/roles.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';

import { createApp } from '#server/app.ts';
import type { Config } from '#server/config.ts';
import { createOrm } from '#server/db/orm.ts';
import type { Dependencies } from '#server/dependencies.ts';
import { User } from '#server/modules/accounts/account.entity.ts';
import { createSessionManager, hashPassword } from '#server/modules/accounts/index.ts';
import { Membership, Team } from '#server/modules/teams/team.entity.ts';

import { ApiClient } from './client.ts';
import { createTestDatabase } from './database.ts';

/** The password of every person that `addPerson` makes. */
export const TEST_PASSWORD = 'a password for tests';

export interface TestPerson {
  id: string;
  email: string;
  name: string;
  /** Signed in as this person. */
  client: ApiClient;
}

/** A person of a team, with the id of the membership. */
export interface TestMember extends TestPerson {
  memberId: string;
  roles: Role[];
}

export interface TestTeam {
  id: string;
  name: string;
  /** One member for each role, who holds only that role. */
  members: Record<Role, TestMember>;
  /** The client of the member with that role. */
  as: (role: Role) => ApiClient;
}

export interface TestApp {
  orm: MikroORM;
  config: Config;
  baseUrl: string;
  databaseUrl: string;
  /** Signed in as nobody. */
  stranger: () => ApiClient;
  addPerson: (input?: { name?: string; email?: string }) => Promise<TestPerson>;
  addMember: (input: { teamId: string; roles: Role[]; name?: string }) => Promise<TestMember>;
  /** An empty team with one member for each role. */
  addTeam: (input?: { name?: string }) => Promise<TestTeam>;
  /** Ends the server, closes the database and removes it. */
  stop: () => Promise<void>;
}

export interface TestAppOptions {
  /** A database that somebody else made and will remove, such as one that two servers share. */
  databaseUrl?: string;
  config?: Partial<Config>;
  /** Parts of the application to replace. */
  replace?: Partial<Dependencies>;
}

/** Starts the real application on a free port, on a database of its own. */
export async function startTestApp(options: TestAppOptions = {}): Promise<TestApp> {
  const database =
    options.databaseUrl === undefined
      ? await createTestDatabase()
      : { databaseUrl: options.databaseUrl, drop: () => Promise.resolve() };
  const config = testConfig({ databaseUrl: database.databaseUrl, ...options.config });
  const orm = await createOrm({ databaseUrl: config.databaseUrl });
  const sessions = createSessionManager(orm, config);
  const logger = pino({ level: 'silent' });
  const deps: Dependencies = { config, orm, logger, sessions, now: () => new Date(), ...options.replace };
  const server = await listenAnywhere(createServer(createApp(deps)));
  const { port } = server.address() as AddressInfo;
  const baseUrl = `http://127.0.0.1:${port}`;
  return {
    orm,
    config,
    baseUrl,
    databaseUrl: database.databaseUrl,
    ...peopleOf(deps, () => new ApiClient(server)),
    stop: async () => {
      server.closeAllConnections();
      server.close();
      await orm.close(true);
      await database.drop();
    },
  };
}

function testConfig(changes: Partial<Config>): Config {
  return {
    databaseUrl: '',
    host: '127.0.0.1',
    port: 0,
    publicOrigins: [],
    webRoot: join(tmpdir(), 'oxymel-no-web-root'),
    secureCookies: false,
    logLevel: 'silent',
    dataFolder: tmpdir(),
    trustProxy: false,
    rateLimitFactor: 10_000,
    seedDemo: false,
    ownCluster: false,
    ...changes,
  };
}

function listenAnywhere(server: Server): Promise<Server> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => resolve(server));
  });
}

let testHash: Promise<string> | undefined;

/** People and teams are written straight into the database: tests of sign-up and invitations use the routes. */
function peopleOf({ orm, sessions }: Dependencies, newClient: () => ApiClient) {
  const addPerson = async ({ name = 'Person', email = `${randomUUID()}@example.test` } = {}) => {
    testHash ??= hashPassword(TEST_PASSWORD);
    const id = randomUUID();
    await orm.em.fork().insert(User, { id, email, name, passwordHash: await testHash });
    const session = await sessions.createSession(id, {});
    const client = newClient();
    client.cookie = `${sessions.sessionCookieName}=${session.id}`;
    return { id, email, name, client };
  };
  const addMember: TestApp['addMember'] = async ({ teamId, roles, name = `The ${roles.join(' and ')}` }) => {
    const person = await addPerson({ name });
    const memberId = randomUUID();
    await orm.em.fork().insert(Membership, { id: memberId, team: teamId, user: person.id, roles });
    return { ...person, memberId, roles };
  };
  const addTeam: TestApp['addTeam'] = async ({ name = 'The Gannet Room' } = {}) => {
    const id = randomUUID();
    const settings = { country: 'GB', currency: 'GBP', houseMeasures: DEFAULT_HOUSE_MEASURES } as const;
    await orm.em.fork().insert(Team, { id, name, ...settings });
    const pairs = ROLES.map(async (role) => [role, await addMember({ teamId: id, roles: [role] })] as const);
    const members = Object.fromEntries(await Promise.all(pairs)) as Record<Role, TestMember>;
    return { id, name, members, as: (role) => members[role].client };
  };
  return { stranger: newClient, addPerson, addMember, addTeam };
}
