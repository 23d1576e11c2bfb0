import type { TSchema } from '@sinclair/typebox';
import type { ErrorObject, ValidateFunction } from 'ajv';
import { Ajv2020 } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';

import type { FieldError } from '#shared/contracts/problem.ts';

import { escapePointer } from './json-limits.ts';
import { problems } from './problems.ts';

/** Errors listed in one answer: a body that is wrong everywhere does not need a thousand sentences. */
const MAX_ERRORS = 50;

function createAjv(options: { coerce: boolean }): Ajv2020 {
  const ajv = new Ajv2020({
    strict: true,
    allErrors: true,
    verbose: true,
    coerceTypes: options.coerce,
    allowUnionTypes: true,
    discriminator: false,
  });
  addFormats.default(ajv);
  return ajv;
}

const bodyAjv = createAjv({ coerce: false });
const textAjv = createAjv({ coerce: true });

/** Compiles the checker of a JSON body: nothing is coerced, added or removed. */
export function compileBodyCheck(schema: TSchema): (value: unknown) => void {
  return throwing(bodyAjv.compile(withoutId(schema)));
}

/** Compiles the checker of path or query members, which arrive as text: numbers are coerced in place. */
export function compileTextCheck(schema: TSchema): (value: unknown) => void {
  return throwing(textAjv.compile(withoutId(schema)));
}

/** The same schema may be compiled by several routes, so its `$id` stays out of Ajv's registry. */
function withoutId(schema: TSchema): TSchema {
  const { $id: _omitted, ...rest } = schema;
  return rest;
}

function throwing(validate: ValidateFunction): (value: unknown) => void {
  return (value) => {
    if (validate(value)) return;
    throw problems.invalidFields(fieldErrors(validate.errors ?? []));
  };
}

/** Turns Ajv's errors into one sentence per field, each with a JSON Pointer to the field itself. */
export function fieldErrors(errors: readonly ErrorObject[]): FieldError[] {
  const byPointer = new Map<string, FieldError>();
  for (const error of errors) {
    if (byPointer.size >= MAX_ERRORS) break;
    if (error.keyword === 'anyOf' || error.keyword === 'oneOf') continue;
    const pointer = pointerOf(error);
    if (!byPointer.has(pointer)) {
      byPointer.set(pointer, { pointer, code: error.keyword, detail: sentence(error, pointer) });
    }
  }
  if (byPointer.size === 0) {
    const pointer = errors[0] ? pointerOf(errors[0]) : '#';
    byPointer.set(pointer, {
      pointer,
      code: 'not-one-of',
      detail: `${fieldName(pointer)} has none of the allowed shapes.`,
    });
  }
  return [...byPointer.values()];
}

/** Ajv reports a missing or surplus member at its parent: the pointer names the member. */
function pointerOf(error: ErrorObject): string {
  const parameters = error.params as { missingProperty?: string; additionalProperty?: string };
  const member = parameters.missingProperty ?? parameters.additionalProperty;
  return `#${error.instancePath}${member === undefined ? '' : `/${escapePointer(member)}`}`;
}

function fieldName(pointer: string): string {
  const parts = pointer.split('/').slice(1);
  if (parts.length === 0) return 'The body';
  return parts.map((part) => (/^\d+$/.test(part) ? `no. ${Number(part) + 1}` : part)).join(' ');
}

function shown(value: unknown): string {
  if (value === undefined) return 'nothing';
  const text = typeof value === 'string' ? `“${value}”` : JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}

function sentence(error: ErrorObject, pointer: string): string {
  const name = fieldName(pointer);
  const description = (error.parentSchema as { description?: string } | undefined)?.description;
  const meaning = description === undefined ? '' : ` (${description})`;
  const limit = (error.params as { limit?: number }).limit;
  const value = shown(error.data);
  switch (error.keyword) {
    case 'required':
      return `${name} is missing.`;
    case 'additionalProperties':
      return `${name} is not a known field.`;
    case 'minimum':
      return `${name}${meaning} is ${value}; it must be at least ${limit ?? ''}.`;
    case 'exclusiveMinimum':
      return `${name}${meaning} is ${value}; it must be more than ${limit ?? ''}.`;
    case 'maximum':
    case 'exclusiveMaximum':
      return `${name}${meaning} is ${value}; it must be at most ${limit ?? ''}.`;
    case 'minLength':
      return limit === 1
        ? `${name}${meaning} is empty.`
        : `${name}${meaning} needs at least ${limit ?? ''} characters.`;
    case 'maxLength':
      return `${name}${meaning} has more than ${limit ?? ''} characters.`;
    case 'minItems':
      return `${name}${meaning} needs at least ${limit ?? ''}.`;
    case 'maxItems':
      return `${name}${meaning} has more than ${limit ?? ''} entries.`;
    case 'enum':
      return `${name}${meaning} is ${value}; allowed are ${(error.params as { allowedValues: unknown[] }).allowedValues.join(', ')}.`;
    case 'type':
      return `${name}${meaning} is ${value}; it must be a ${String((error.params as { type: unknown }).type)}.`;
    case 'format':
      return `${name} is ${value}, which is not a valid ${String((error.params as { format: unknown }).format)}.`;
    case 'pattern':
      return `${name}${meaning} is ${value}, which has characters that are not allowed here.`;
    default:
      return `${name}${meaning} is ${value}: it ${error.message ?? 'is not valid'}.`;
  }
}
