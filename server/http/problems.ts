import type { FieldError, Problem, ProblemName } from '#shared/contracts/problem.ts';

/** Title and status of every problem, in one place. Meanings are in docs/problems. */
const CATALOGUE: Readonly<Record<ProblemName, { status: number; title: string }>> = {
  'malformed-request': { status: 400, title: 'The request cannot be read' },
  unauthenticated: { status: 401, title: 'Sign in first' },
  'wrong-credentials': { status: 401, title: 'E-mail or password not right' },
  forbidden: { status: 403, title: 'Your roles in this team do not allow this' },
  'not-found': { status: 404, title: 'Not found' },
  'already-exists': { status: 409, title: 'This already exists' },
  'in-use': { status: 409, title: 'Something else still uses this' },
  'not-allowed-in-state': { status: 409, title: 'Not possible in its present state' },
  'stale-version': { status: 412, title: 'Somebody else saved in the meantime' },
  'payload-too-large': { status: 413, title: 'Too large' },
  'unsupported-media-type': { status: 415, title: 'Send JSON' },
  'invalid-fields': { status: 422, title: 'Some fields need another value' },
  'precondition-required': { status: 428, title: 'Say which revision this edit is based on' },
  'too-many-requests': { status: 429, title: 'Too many tries' },
  internal: { status: 500, title: 'Something went wrong on the server' },
  unavailable: { status: 503, title: 'The database cannot be reached' },
};

type ExtraMembers = Partial<
  Pick<
    Problem,
    'errors' | 'resource' | 'id' | 'conflictingId' | 'currentRevision' | 'current' | 'retryAfterSeconds'
  >
>;

/** An error that a client is told about. Everything else becomes `internal` and tells a stranger nothing. */
export class ProblemError extends Error {
  readonly problemName: ProblemName;
  readonly extra: ExtraMembers;

  constructor(problemName: ProblemName, detail: string, extra: ExtraMembers = {}) {
    super(detail);
    this.name = 'ProblemError';
    this.problemName = problemName;
    this.extra = extra;
  }

  get status(): number {
    return CATALOGUE[this.problemName].status;
  }

  toProblem(instance: string): Problem {
    const { status, title } = CATALOGUE[this.problemName];
    return {
      type: `/problems/${this.problemName}`,
      title,
      status,
      detail: this.message,
      instance,
      name: this.problemName,
      ...this.extra,
    };
  }
}

const SAVED_MEANWHILE = 'Somebody else saved this after you opened it. Nothing of yours was written.';

export const problems = {
  malformedRequest: (detail: string) => new ProblemError('malformed-request', detail),
  unauthenticated: () => new ProblemError('unauthenticated', 'This needs a signed-in person.'),
  wrongCredentials: () =>
    new ProblemError('wrong-credentials', 'The e-mail address or the password is not right.'),
  forbidden: (detail: string) => new ProblemError('forbidden', detail),
  notFound: (resource: string, id: string) =>
    new ProblemError('not-found', `There is no such ${resource} here.`, { resource, id }),
  alreadyExists: (resource: string, detail: string, conflictingId: string | null = null) =>
    new ProblemError('already-exists', detail, { resource, conflictingId }),
  inUse: (resource: string, detail: string) => new ProblemError('in-use', detail, { resource }),
  notAllowedInState: (detail: string) => new ProblemError('not-allowed-in-state', detail),
  staleVersion: (currentRevision: number, current: unknown) =>
    new ProblemError('stale-version', SAVED_MEANWHILE, { currentRevision, current }),
  /** Stale too, found out by the database; the caller has to read again. */
  savedMeanwhile: () => new ProblemError('stale-version', SAVED_MEANWHILE),
  preconditionRequired: () =>
    new ProblemError('precondition-required', 'Send If-Match with the revision this edit is based on.'),
  invalidFields: (errors: FieldError[]) =>
    new ProblemError('invalid-fields', errors.map((error) => error.detail).join(' '), { errors }),
  invalidField: (pointer: string, code: string, detail: string) =>
    problems.invalidFields([{ pointer, code, detail }]),
  tooManyRequests: (retryAfterSeconds: number) =>
    new ProblemError('too-many-requests', `Too many tries. Try again in ${retryAfterSeconds} s.`, {
      retryAfterSeconds,
    }),
  payloadTooLarge: (limit: string) =>
    new ProblemError('payload-too-large', `The body is larger than ${limit}.`),
  unsupportedMediaType: (detail = 'The body must be application/json.') =>
    new ProblemError('unsupported-media-type', detail),
  unavailable: () => new ProblemError('unavailable', 'The database does not answer. Try again in a moment.'),
  internal: () => new ProblemError('internal', 'The fault was logged under the instance named here.'),
};
