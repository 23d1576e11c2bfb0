import { type Static, Type } from '@sinclair/typebox';

import { Uuid, nullable, oneOf } from './common.ts';

/** Names of the problems of this API (RFC 9457). `type` is `/problems/<name>`, explained in docs/problems. */
export const PROBLEM_NAMES = [
  'malformed-request',
  'unauthenticated',
  'wrong-credentials',
  'forbidden',
  'not-found',
  'already-exists',
  'in-use',
  'not-allowed-in-state',
  'stale-version',
  'precondition-required',
  'payload-too-large',
  'unsupported-media-type',
  'invalid-fields',
  'too-many-requests',
  'internal',
  'unavailable',
] as const;
export type ProblemName = (typeof PROBLEM_NAMES)[number];

export const FieldErrorSchema = Type.Object(
  {
    pointer: Type.String({ description: 'JSON Pointer fragment of the field, such as #/lines/2/amount' }),
    code: Type.String({ description: 'machine word for the rule that was broken' }),
    detail: Type.String({ description: 'names the field, the value and the limit' }),
  },
  { additionalProperties: false },
);
export type FieldError = Static<typeof FieldErrorSchema>;

export const ProblemSchema = Type.Object(
  {
    type: Type.String(),
    title: Type.String(),
    status: Type.Integer({ minimum: 400, maximum: 599 }),
    detail: Type.String(),
    instance: Type.String({ description: 'identifies this request in the log' }),
    name: oneOf(PROBLEM_NAMES),
    errors: Type.Optional(Type.Array(FieldErrorSchema)),
    resource: Type.Optional(Type.String()),
    id: Type.Optional(Type.String()),
    conflictingId: Type.Optional(nullable(Uuid)),
    currentRevision: Type.Optional(Type.Integer()),
    current: Type.Optional(
      Type.Unknown({ description: 'the resource as it stands now, with stale-version' }),
    ),
    retryAfterSeconds: Type.Optional(Type.Integer()),
  },
  { $id: 'Problem', additionalProperties: false },
);
export type Problem = Static<typeof ProblemSchema>;
