/** How a connection is made, beyond its address. Given to the PostgreSQL driver as it is. */
export interface ConnectionOptions {
  ssl: false | { rejectUnauthorized: boolean };
  connectionTimeoutMillis: number;
}

const CONNECT_MS = 10_000;

/** The encryptions that `?sslmode=` of a database address can ask for; as in libpq, `require` trusts any certificate. */
const SSL_MODES = new Map<string | null, ConnectionOptions['ssl']>([
  [null, false],
  ['disable', false],
  ['require', { rejectUnauthorized: false }],
  ['verify-ca', { rejectUnauthorized: true }],
  ['verify-full', { rejectUnauthorized: true }],
]);

/** Reads the options from a database address. The ORM itself passes over what stands behind the question mark. */
export function connectionOptionsOf(databaseUrl: string): ConnectionOptions {
  const mode = new URL(databaseUrl).searchParams.get('sslmode');
  const ssl = SSL_MODES.get(mode);
  if (ssl === undefined) throw new RangeError(`sslmode=${mode ?? ''} is not one of ${sslModes().join(', ')}`);
  return { ssl, connectionTimeoutMillis: CONNECT_MS };
}

function sslModes(): string[] {
  return [...SSL_MODES.keys()].filter((mode) => mode !== null);
}
