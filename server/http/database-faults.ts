/** Codes of the operating system and of PostgreSQL that mean: there is no database to talk to at this moment. */
const UNREACHABLE = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ENOTFOUND',
  'EAI_AGAIN',
  'ETIMEDOUT',
  'EHOSTUNREACH',
  'ENETUNREACH',
  '53300',
  '57P01',
  '57P02',
  '57P03',
  '3D000',
]);

/** Messages of the driver and its pool, which give these no code. */
const UNREACHABLE_WORDS = /Connection terminated|connection is not queryable|acquiring a connection/i;

/** Whether the error says that the database cannot be reached, as against one that answered and refused. */
export function isDatabaseUnreachable(error: unknown): boolean {
  return causesOf(error).some(({ code, message }) => {
    if (typeof code === 'string' && (UNREACHABLE.has(code) || code.startsWith('08'))) return true;
    return typeof message === 'string' && UNREACHABLE_WORDS.test(message);
  });
}

/** Whether PostgreSQL refused a value as such (its class 22, data exception): a date or number no column holds. */
export function isValueRefused(error: unknown): boolean {
  return causesOf(error).some(({ code }) => typeof code === 'string' && /^22[0-9A-Z]{3}$/.test(code));
}

interface Cause {
  code?: unknown;
  message?: unknown;
  cause?: unknown;
  errors?: unknown;
}

/** The error and those it was made from; a list tried in vain, such as IPv4 and IPv6, counts with all its members. */
function causesOf(error: unknown): Cause[] {
  const found: Cause[] = [];
  const waiting: unknown[] = [error];
  while (waiting.length > 0 && found.length < 20) {
    const next = waiting.shift();
    if (typeof next !== 'object' || next === null) continue;
    const cause: Cause = next;
    found.push(cause);
    waiting.push(cause.cause, ...(Array.isArray(cause.errors) ? (cause.errors as unknown[]) : []));
  }
  return found;
}
