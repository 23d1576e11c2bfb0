import { Agent, createServer, request } from 'node:http';
import type { AddressInfo } from 'node:net';

import type { MikroORM } from '@mikro-orm/postgresql';
import { pino } from 'pino';

import type { SpecPage } from '#shared/contracts/spec.ts';

import { createApp } from '#server/app.ts';
import type { Config } from '#server/config.ts';
import { createOrm, migrate } from '#server/db/orm.ts';
import { createSessionManager } from '#server/modules/accounts/index.ts';
import { listSpecs } from '#server/modules/specs/spec.queries.ts';
import { createDatabaseIn } from '#tests/support/database-in.ts';
import { startTestCluster } from '#tests/support/test-cluster.ts';
import type { BenchModule, Row } from './harness.ts';
import { type ManySpecs, SPEC_COUNT, fillWithSpecs } from './many-specs.ts';

/**
 * The answer over HTTP, session and membership looked up, may take this many times as long as the statement of the list alone.
 * The list without HTTP is shown beside it, so that one sees which of the two a slow answer comes from.
 */
const WANTED_RATIO = 3;

/** Times that each way is taken, in turn. */
const RUNS = 60;
const WARM_UP_RUNS = 30;

/** One way of asking for the list, and the statement that a person would write for the same. */
interface ListCase {
  name: string;
  query: string;
  sql: string;
}

const COLUMNS = `s.id, s.revision, s.family_id, s.name, s.variant_name, s.latest_version_id, s.latest_number,
  s.latest_state, s.locked_version_id, s.locked_number, s.final_ml, s.abv_fraction, s.sugar_g_per_l,
  s.acid_citric_g_per_l, s.updated_at, u.id as user_id, u.name as user_name, s.retired_at`;
const FROM =
  'from spec s left join app_user u on u.id = s.updated_by_id where s.team_id = ? and s.retired_at is null';
const PAGE = 'limit 51';
const NAMED = `lower(s.name || ' ' || coalesce(s.variant_name, '')) like`;
const NEWEST = `order by s.updated_at desc, s.id desc ${PAGE}`;

const CASES: readonly ListCase[] = [
  { name: 'first page, newest first', query: '', sql: NEWEST },
  {
    name: 'first page, by name',
    query: 'sort=name',
    sql: `order by s.name collate "und-x-icu", s.id ${PAGE}`,
  },
  {
    name: 'first page, strongest first',
    query: 'sort=-abv',
    sql: `order by coalesce(s.abv_fraction, -1) desc, s.id desc ${PAGE}`,
  },
  { name: 'one state', query: 'state=locked', sql: `and s.latest_state = 'locked' ${NEWEST}` },
  { name: 'search found in 2,000', query: 'search=copper', sql: `and ${NAMED} '%copper%' ${NEWEST}` },
  {
    name: 'search found in 20',
    query: 'search=copper+bell+flip',
    sql: `and ${NAMED} '%copper bell flip%' ${NEWEST}`,
  },
  { name: 'search found in one', query: 'search=19999', sql: `and ${NAMED} '%19999%' ${NEWEST}` },
  { name: 'search found nowhere', query: 'search=espresso', sql: `and ${NAMED} '%espresso%' ${NEWEST}` },
  { name: 'search of two letters', query: 'search=be', sql: `and ${NAMED} '%be%' ${NEWEST}` },
];

async function measure(): Promise<Row[]> {
  const given = process.env['OXYMEL_BENCH_DATABASE_URL'];
  if (given !== undefined) return measureIn(given);
  const cluster = await startTestCluster();
  try {
    return await measureIn(cluster.adminUrl);
  } finally {
    await cluster.guard.finish();
  }
}

/** Measures in a database of its own, made where `adminUrl` may make one, and removed afterwards. */
async function measureIn(adminUrl: string): Promise<Row[]> {
  const database = await createDatabaseIn(adminUrl, { template: 'template0' });
  const orm = await createOrm({ databaseUrl: database.databaseUrl });
  try {
    await migrate(orm);
    return await measureLists(orm, await fillWithSpecs(orm));
  } finally {
    await orm.close(true);
    await database.drop();
  }
}

async function measureLists(orm: MikroORM, { teamId, personId }: ManySpecs): Promise<Row[]> {
  const sessions = createSessionManager(orm, { secureCookies: false });
  const server = createServer(
    createApp({ config: CONFIG, orm, logger: pino({ level: 'silent' }), sessions, now: () => new Date() }),
  );
  await new Promise<void>((resolve) => void server.listen(0, '127.0.0.1', resolve));
  const { id } = await sessions.createSession(personId, {});
  const { port } = server.address() as AddressInfo;
  const address = { port, teamId, cookie: `${sessions.sessionCookieName}=${id}` };
  try {
    const rows: Row[] = [];
    for (const listCase of CASES) rows.push(await measureCase(orm, address, listCase));
    return rows;
  } finally {
    server.closeAllConnections();
    server.close();
  }
}

const CONFIG: Config = {
  databaseUrl: '',
  host: '127.0.0.1',
  port: 0,
  publicOrigins: [],
  webRoot: '/nowhere',
  secureCookies: false,
  logLevel: 'silent',
  dataFolder: '/nowhere',
  trustProxy: false,
  rateLimitFactor: 1,
  seedDemo: false,
  ownCluster: false,
};

interface Address {
  port: number;
  teamId: string;
  cookie: string;
}

async function measureCase(orm: MikroORM, address: Address, { name, query, sql }: ListCase): Promise<Row> {
  const { teamId } = address;
  const statement = `select ${COLUMNS} ${FROM} ${sql}`;
  const ways = {
    bare: () => orm.em.getConnection().execute<unknown[]>(statement, [teamId]),
    list: () => listSpecs(orm.em.fork(), { teamId, query: Object.fromEntries(new URLSearchParams(query)) }),
    http: () => get(address, `/api/teams/${teamId}/specs?${query}`),
  };
  checkSame(await ways.bare(), await ways.http());
  const times = { bare: [] as number[], list: [] as number[], http: [] as number[] };
  for (let run = -WARM_UP_RUNS; run < RUNS; run += 1) {
    for (const way of ['bare', 'list', 'http'] as const) {
      const ms = await timeMs(ways[way]);
      if (run >= 0) times[way].push(ms);
    }
  }
  return rowOf(name, { bare: median(times.bare), list: median(times.list), http: median(times.http) });
}

function rowOf(name: string, ms: { bare: number; list: number; http: number }): Row {
  const ratio = ms.http / ms.bare;
  const alone = `list alone ${(ms.list / ms.bare).toFixed(2)} x`;
  const remark = `${ms.http.toFixed(2)} ms over HTTP, ${ms.bare.toFixed(2)} ms bare; ${alone}`;
  return {
    name,
    value: `${ratio.toFixed(2)} x`,
    remark: ratio <= WANTED_RATIO ? remark : `FAILED: ${remark}`,
  };
}

/** The comparison means something only while both give the same rows. */
function checkSame(bare: unknown[], body: string): void {
  const { items } = JSON.parse(body) as SpecPage;
  const expected = (bare as { id: string }[]).slice(0, 50).map(({ id }) => id);
  if (items.map(({ id }) => id).join() !== expected.join())
    throw new Error('the list and the statement differ');
}

async function timeMs(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return performance.now() - start;
}

function median(values: readonly number[]): number {
  return values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)]!;
}

const agent = new Agent({ keepAlive: true });

function get({ port, cookie }: Address, path: string): Promise<string> {
  return new Promise((resolve, reject) => {
    const sent = request({ host: '127.0.0.1', port, path, agent, headers: { cookie } }, (response) => {
      const chunks: Buffer[] = [];
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('end', () => {
        const text = Buffer.concat(chunks).toString('utf8');
        if (response.statusCode === 200) resolve(text);
        else reject(new Error(`${path} answered ${response.statusCode ?? 0}: ${text}`));
      });
    });
    sent.on('error', reject);
    sent.end();
  });
}

export const listBench: BenchModule = {
  title: `List and search over ${SPEC_COUNT.toLocaleString('en')} specs, time over HTTP ÷ time of the bare statement`,
  measure,
};
