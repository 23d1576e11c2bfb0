import type { TSchema } from '@sinclair/typebox';
import type { ValidateFunction } from 'ajv';
import { Ajv2020 } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import type { Response } from 'supertest';

import { ProblemSchema } from '#shared/contracts/problem.ts';

import type { AnyRoute } from '#server/http/route.ts';
import { apiRoutes } from '#server/routes.ts';

const ajv = new Ajv2020({ strict: true, allErrors: true, allowUnionTypes: true });
addFormats(ajv);
const routes = apiRoutes();
const compiled = new Map<TSchema, ValidateFunction>();

/** Fails unless the answer is what the called route's contract says: its status, its schema, or a problem. */
export function checkAnswer(input: { method: string; path: string; response: Response }): void {
  const { method, path, response } = input;
  const where = `${method.toUpperCase()} ${path} answered ${response.status}`;
  if (response.status >= 400) {
    checkProblem(where, response);
    return;
  }
  const definition = routeFor({ method, path });
  if (definition === undefined) throw new Error(`${where}, and no route declares it`);
  const { status, schema, contentType } = definition.response;
  if (response.status !== status) throw new Error(`${where}; its contract says ${status}`);
  if (schema === null && response.text !== '') throw new Error(`${where} with a body, which it has not`);
  if (schema !== null && contentType === undefined) checkSchema(where, schema, response.body);
}

function checkProblem(where: string, response: Response): void {
  const type = response.headers['content-type'];
  if (type !== 'application/problem+json; charset=utf-8') throw new Error(`${where} as ${String(type)}`);
  checkSchema(where, ProblemSchema, response.body);
  const problem = response.body as { status: number; instance: string };
  if (problem.status !== response.status) throw new Error(`${where}, but its body says ${problem.status}`);
  if (problem.instance !== `urn:uuid:${response.headers['x-request-id']}`) {
    throw new Error(`${where} with the instance ${problem.instance}, not the request's id`);
  }
}

function checkSchema(where: string, schema: TSchema, body: unknown): void {
  const validate = compiled.get(schema) ?? compile(schema);
  if (validate(body)) return;
  throw new Error(`${where} against its schema: ${ajv.errorsText(validate.errors)}\n${JSON.stringify(body)}`);
}

function compile(schema: TSchema): ValidateFunction {
  const { $id: _id, ...rest } = schema;
  const validate = ajv.compile(rest);
  compiled.set(schema, validate);
  return validate;
}

/** The route of a path. One without parameters goes first, as in the order of the routes. */
export function routeFor({ method, path }: { method: string; path: string }): AnyRoute | undefined {
  const [plainPath = ''] = path.split('?', 1);
  return routes.find((candidate) => candidate.method === method && patternOf(candidate.path).test(plainPath));
}

function patternOf(path: string): RegExp {
  const escaped = path.replaceAll('.', '\\.').replaceAll(/:\w+/g, '[^/]+');
  return new RegExp(`^${escaped}$`);
}
