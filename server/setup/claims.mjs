import { linkSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';

/**
 * Who holds a claim: a process, and the address it answers at once it has one.
 *
 * @typedef {object} Holder
 * @property {number} pid
 * @property {string} startedAt when the process began, as the system counts it; tells a reused process id
 * @property {string} doing what it is, for messages
 * @property {string} [address]
 */

/** @typedef {{ ok: true, release: () => void } | { ok: false, holder: Holder }} Claim */

const ATTEMPTS = 20;

/**
 * Claims a file for this process. Of several that try at once exactly one succeeds; the claim of a process that
 * has died is taken over.
 *
 * @param {string} file
 * @param {{ doing: string, address?: string }} claimant
 * @returns {Claim}
 */
export function claim(file, claimant) {
  mkdirSync(dirname(file), { recursive: true });
  const own = { pid: process.pid, startedAt: startOf(process.pid) ?? '', ...claimant };
  const draft = `${file}.${process.pid}`;
  try {
    writeFileSync(draft, JSON.stringify(own), { mode: 0o644 });
    for (let attempt = 0; attempt < ATTEMPTS; attempt += 1) {
      if (linked(draft, file)) return { ok: true, release: () => releaseOwn(file) };
      const holder = holderOf(file);
      if (holder !== undefined) return { ok: false, holder };
      removeAbandoned(file);
    }
    throw new Error(`${file} could not be claimed`);
  } finally {
    rmSync(draft, { force: true });
  }
}

/**
 * The living process that holds the file, if any.
 *
 * @param {string} file
 * @returns {Holder | undefined}
 */
export function holderOf(file) {
  const holder = readHolder(file);
  if (holder === undefined) return undefined;
  return startOf(holder.pid) === holder.startedAt ? holder : undefined;
}

/**
 * @param {string} draft
 * @param {string} file
 */
function linked(draft, file) {
  try {
    linkSync(draft, file);
    return true;
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EEXIST') return false;
    throw error;
  }
}

/**
 * Removes the claim of a process that has died. It is moved aside before it is judged: another start may have
 * taken it over meanwhile, and then it is put back.
 *
 * @param {string} file
 */
function removeAbandoned(file) {
  const aside = `${file}.${process.pid}.aside`;
  try {
    renameSync(file, aside);
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'ENOENT') return;
    throw error;
  }
  if (holderOf(aside) !== undefined) linked(aside, file);
  rmSync(aside, { force: true });
}

/** @param {string} file */
function releaseOwn(file) {
  if (readHolder(file)?.pid === process.pid) rmSync(file, { force: true });
}

/**
 * @param {string} file
 * @returns {Holder | undefined}
 */
function readHolder(file) {
  try {
    const content = JSON.parse(readFileSync(file, 'utf8'));
    return typeof content?.pid === 'number' && typeof content.startedAt === 'string' ? content : undefined;
  } catch {
    return undefined;
  }
}

/**
 * When a process began, in clock ticks since the machine started; undefined when there is no such process.
 *
 * @param {number} pid
 * @returns {string | undefined}
 */
function startOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    const [state] = fields;
    // Field 22 of the line; the first two end before the slice. A zombie has ended.
    return state === 'Z' ? undefined : fields[19];
  } catch {
    return undefined;
  }
}

/**
 * Says that a data folder is in use, and how to end that.
 *
 * @param {Holder} holder
 */
export function describeHolder({ pid, doing, address }) {
  const what =
    address === undefined ? `is being started by another "${doing}"` : `is already running at ${address}`;
  return `Oxymel ${what} (process ${pid}). Use that one, or stop it first: kill ${pid}`;
}
