/** A failure that has been put into words for the person who starts Oxymel. No stack is shown for it. */
export class SetupError extends Error {
  /** @param {string} message what happened and what to do */
  constructor(message) {
    super(message);
    this.name = 'SetupError';
  }
}

/** What to do about the failures that any tool may meet, known by what it printed. */
const KNOWN_CAUSES = [
  {
    pattern:
      /ENOSPC|No space left on device|disk full|could not extend file|Check free disk space|write error.*space/i,
    advice: 'The disk is full. Free some space and start again; nothing half done is kept.',
  },
  {
    pattern: /EDQUOT|Disk quota exceeded/i,
    advice: 'The disk quota of this user is used up. Free some space and start again.',
  },
  {
    pattern: /EROFS|Read-only file system/i,
    advice: 'The file system is read-only. Work in a folder that can be written to, or set OXYMEL_DATA_DIR.',
  },
  {
    pattern: /EACCES|EPERM|Permission denied|Operation not permitted/i,
    advice:
      'This user may not write there. Start as the user who owns the project folder, or correct its owner with chown.',
  },
  {
    pattern:
      /ENOTFOUND|EAI_AGAIN|ETIMEDOUT|ECONNRESET|ECONNREFUSED|ENETUNREACH|Temporary failure resolving|Could not resolve|Failed to fetch|Unable to fetch|Could not connect/i,
    advice: 'The network did not answer. Check the connection and start again.',
  },
  {
    pattern: /ENOMEM|Cannot allocate memory|heap out of memory|could not map anonymous shared memory/i,
    advice: 'There is not enough memory. Close other programs and start again.',
  },
];

/**
 * The advice for a failure, from what a tool printed or from an operating system's error; undefined when unknown.
 *
 * @param {string} output
 * @returns {string | undefined}
 */
export function adviceFor(output) {
  return KNOWN_CAUSES.find(({ pattern }) => pattern.test(output))?.advice;
}

const SHOWN_LINES = 12;

/**
 * The message for a step that failed: what failed, what to do, and the tool's own last lines when the cause is not known.
 *
 * @param {{ doing: string, output: string }} failure
 */
export function describeFailure({ doing, output }) {
  const advice = adviceFor(output);
  if (advice !== undefined) return `${doing} failed. ${advice}`;
  const lines = output.trim().split('\n').slice(-SHOWN_LINES);
  return `${doing} failed. It said:\n${lines.map((line) => `    ${line}`).join('\n')}`;
}

/**
 * The message for whatever ended the set-up.
 *
 * @param {unknown} error
 */
export function explainSetupFailure(error) {
  if (error instanceof SetupError) return error.message;
  if (!(error instanceof Error)) return String(error);
  const { code = '', path, message } = /** @type {NodeJS.ErrnoException} */ (error);
  const advice = adviceFor(code);
  if (advice === undefined) return message;
  return path === undefined ? advice : `${path}: ${advice}`;
}
