import { Migrator } from '@mikro-orm/migrations';
import { MikroORM, type Options, UnderscoreNamingStrategy } from '@mikro-orm/postgresql';

import { RateLimitWindow } from '../http/rate-limit.entity.ts';
import { Session, User } from '../modules/accounts/account.entity.ts';
import { Glass } from '../modules/glasses/glass.entity.ts';
import { Ingredient } from '../modules/ingredients/ingredient.entity.ts';
import { Spec, SpecVersion, TastingNote } from '../modules/specs/spec.entity.ts';
import { AuditEvent, Invitation, Membership, Team } from '../modules/teams/team.entity.ts';
import { connectionOptionsOf } from './connection-options.ts';
import { migrationsList } from './migrations/index.ts';

export interface OrmOptions {
  databaseUrl: string;
  /** Receives what the ORM would print; silent when not given. */
  log?: (message: string) => void;
  poolMax?: number;
}

/** `sugarGPerL` becomes `sugar_g_per_l`: a unit's letter is a word of its own. */
class SnakeCaseWithUnits extends UnderscoreNamingStrategy {
  override propertyToColumnName(propertyName: string): string {
    return propertyName
      .replace(/([a-z\d])([A-Z])/g, '$1_$2')
      .replace(/([A-Z])([A-Z][a-z])/g, '$1_$2')
      .toLowerCase();
  }
}

/** Opens the database. Nothing is read before the first query. */
export function createOrm(options: OrmOptions): Promise<MikroORM> {
  return MikroORM.init(ormConfig(options));
}

export function ormConfig({ databaseUrl, log, poolMax = 10 }: OrmOptions): Options {
  return {
    clientUrl: databaseUrl,
    driverOptions: { connection: connectionOptionsOf(databaseUrl) },
    entities: [
      User,
      Session,
      Team,
      Membership,
      Invitation,
      AuditEvent,
      Ingredient,
      Glass,
      Spec,
      SpecVersion,
      TastingNote,
      RateLimitWindow,
    ],
    namingStrategy: SnakeCaseWithUnits,
    extensions: [Migrator],
    migrations: { migrationsList, snapshot: false, tableName: 'schema_migration', transactional: true },
    pool: { min: 0, max: poolMax },
    logger: log ?? (() => undefined),
    forceUtcTimezone: true,
    connect: false,
  };
}

/** Any number, so long as every server asks for the same one. */
const MIGRATION_LOCK = 20_261_201;

/**
 * Brings the schema up to date: every missing migration or, when one fails, none. Servers that start at the same moment
 * wait for each other, and the later ones find nothing to do.
 */
export function migrate(orm: MikroORM): Promise<string[]> {
  return orm.em.fork().transactional(async (em) => {
    const transaction: unknown = em.getTransactionContext();
    await em.getConnection().execute('select pg_advisory_xact_lock(?)', [MIGRATION_LOCK], 'all', transaction);
    const done = await orm.getMigrator().up({ transaction });
    return done.map((migration) => migration.name);
  });
}
