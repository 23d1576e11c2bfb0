import { ConfigError } from '../config.ts';
import { adviceFor, SetupError } from './setup-error.mjs';

const FURTHER_HELP = 'Errors and what to do are listed in docs/running.md.';

/** What to do about the errors of the operating system and of PostgreSQL, by their codes. */
const ADVICE_BY_CODE: Readonly<Record<string, string>> = {
  ECONNREFUSED: 'The database does not answer at the host and port of DATABASE_URL. Is it running there?',
  ENOTFOUND: 'The host name in DATABASE_URL is not known. Check its spelling and the network.',
  EAI_AGAIN: 'The host name in DATABASE_URL could not be looked up. Check its spelling and the network.',
  ETIMEDOUT: 'The database does not answer: the host of DATABASE_URL, or a firewall before it, is silent.',
  EHOSTUNREACH: 'The host of DATABASE_URL cannot be reached from this machine.',
  ENETUNREACH: 'The host of DATABASE_URL cannot be reached from this machine.',
  ECONNRESET: 'The database broke the connection off. Is the port in DATABASE_URL that of PostgreSQL?',
  EADDRNOTAVAIL: 'HOST is not an address of this machine. Use 127.0.0.1, or 0.0.0.0 for every address.',
  '28P01': 'The database refuses the name or the password in DATABASE_URL. Correct them.',
  '28000':
    'The database does not let this user in from here. Check the name in DATABASE_URL and its pg_hba.conf.',
  '3D000': 'The database named in DATABASE_URL does not exist. Create it (createdb), or correct the name.',
  '53300': 'The database has no connection left. Close other programs that use it, or raise max_connections.',
  '53100': 'The disk of the database is full. Free some space and start again; nothing half done is kept.',
  '57P03': 'The database is starting or stopping at this moment. Wait a little and start again.',
  '42501': 'The user in DATABASE_URL may not create tables. Make it the owner of the database.',
};

/** One message for any failure of a start: what happened and what to do. */
export function explainStartFailure(error: unknown): string {
  if (error instanceof ConfigError) return error.messages.join('\n');
  if (error instanceof SetupError) return error.message;
  const chain = causesOf(error);
  const listening = chain.find((cause) => cause['syscall'] === 'listen');
  if (listening !== undefined) return explainListening(listening);
  const migration = chain.map((cause) => textOf(cause['message'])).find((text) => isMigrationFailure(text));
  const advice = chain.map(adviceForCause).find((text) => text !== undefined);
  if (migration !== undefined) return explainMigration(migration, advice);
  return advice ?? `${textOf(chain[0]?.['message']) || String(error)}\n${FURTHER_HELP}`;
}

type Cause = Record<string, unknown>;

/** The error, and the errors it was made from. */
function causesOf(error: unknown): Cause[] {
  const chain: Cause[] = [];
  const waiting = [error];
  while (waiting.length > 0 && chain.length < 20) {
    const next = waiting.shift();
    if (typeof next !== 'object' || next === null || chain.includes(next as Cause)) continue;
    const cause = next as Cause;
    chain.push(cause);
    waiting.push(cause['cause'], cause['previous'], cause['original']);
    if (Array.isArray(cause['errors'])) waiting.push(...(cause['errors'] as unknown[]));
  }
  return chain;
}

function explainListening(error: Cause): string {
  const port = Number(error['port']);
  const where = `${textOf(error['address'])}:${port}`;
  switch (error['code']) {
    case 'EADDRINUSE':
      return (
        `Another program uses ${where} already. Stop that program, ` +
        `or start on another port, for example: PORT=${port + 1} npm start`
      );
    case 'EACCES':
      return `This user may not listen on ${where}: ports below 1024 are for root. Use PORT=3000 or another one above.`;
    default:
      return (
        ADVICE_BY_CODE[textOf(error['code'])] ?? `Listening on ${where} failed: ${textOf(error['message'])}`
      );
  }
}

function adviceForCause(cause: Cause): string | undefined {
  const message = textOf(cause['message']);
  if (/does not support SSL|SSL off|no encryption/i.test(message)) {
    return 'The database and DATABASE_URL do not agree about encryption. Add or remove ?sslmode=require.';
  }
  if (/^timeout expired|connection timeout|Timeout acquiring a connection/i.test(message)) {
    return ADVICE_BY_CODE['ETIMEDOUT'];
  }
  if (/certificate/i.test(message)) {
    return 'The certificate of the database is not trusted. Name its authority in NODE_EXTRA_CA_CERTS.';
  }
  return ADVICE_BY_CODE[textOf(cause['code'])] ?? adviceFor(`${textOf(cause['code'])} ${message}`);
}

function isMigrationFailure(message: string): boolean {
  return /^Migration .* failed/i.test(message);
}

/** Each migration is one transaction, so a failed one has left nothing. */
function explainMigration(message: string, advice: string | undefined): string {
  const [line = ''] = message.split('\n');
  return (
    `${line}\nThe database was left as it was before this migration. ` +
    (advice ?? `Correct the cause, or load a backup, then start again. ${FURTHER_HELP}`)
  );
}

function textOf(value: unknown): string {
  return typeof value === 'string' || typeof value === 'number' ? String(value) : '';
}
