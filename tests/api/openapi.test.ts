import { readFileSync } from 'node:fs';
import { join } from 'node:path';

import type { TSchema } from '@sinclair/typebox';
import { Ajv2020 } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { openApiText } from '#server/http/openapi.ts';
import { apiRoutes } from '#server/routes.ts';
import { PROJECT_ROOT } from '#server/setup/paths.mjs';

import { type TestApp, startTestApp } from '#tests/support/app.ts';

type Json = Record<string, unknown>;

interface Operation {
  operationId: string;
  summary: string;
  security?: Json[];
  'x-permission'?: string;
  parameters: { name: string; in: string; required: boolean; schema: Json }[];
  requestBody?: { content: Record<string, { schema: Json }> };
  responses: Record<string, { description: string; content?: Record<string, { schema: Json }> }>;
}

interface Document {
  openapi: string;
  info: Json;
  paths: Record<string, Record<string, Operation>>;
  components: { schemas: Record<string, Json>; securitySchemes: Json };
}

const routes = apiRoutes();
let app: TestApp;
let document: Document;
beforeAll(async () => {
  app = await startTestApp();
  document = (await app.stranger().get<Document>('/openapi.json')).body;
});
afterAll(() => app.stop());

/** Every object inside a value, with its place. */
function objectsIn(value: unknown, place = '#'): { place: string; value: Json }[] {
  if (typeof value !== 'object' || value === null) return [];
  const inner = Object.entries(value).flatMap(([key, member]) => objectsIn(member, `${place}/${key}`));
  return [{ place, value: value as Json }, ...inner];
}

function resolved(ref: string): unknown {
  return ref
    .replace(/^#\//, '')
    .split('/')
    .reduce<unknown>((value, key) => (value as Json | undefined)?.[key], document);
}

describe('the OpenAPI document', () => {
  it('is in docs/openapi.json as the server gives it; run npm run docs:openapi', () => {
    const file = readFileSync(join(PROJECT_ROOT, 'docs/openapi.json'), 'utf8');
    expect(file).toBe(openApiText(routes));
    expect(JSON.parse(file)).toEqual(document);
  });

  it('is of OpenAPI 3.1 and has the members that it requires', () => {
    expect(document.openapi).toMatch(/^3\.1\.\d$/);
    expect(document.info).toMatchObject({ title: 'Oxymel', version: '1' });
  });

  it('has every route once, under an operationId of its own', () => {
    const operations = Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.entries(methods).map(([method, { operationId }]) => `${method} ${path} ${operationId}`),
    );
    const expected = routes.map(
      ({ method, path, operationId }) => `${method} ${path.replaceAll(/:(\w+)/g, '{$1}')} ${operationId}`,
    );
    expect(operations.sort()).toEqual(expected.sort());
    expect(new Set(routes.map(({ operationId }) => operationId)).size).toBe(routes.length);
  });

  it('refers to nothing that is not in it', () => {
    const refs = objectsIn(document).flatMap(({ place, value }) =>
      typeof value['$ref'] === 'string' ? [[place, value['$ref']] as const] : [],
    );
    expect(refs.length).toBeGreaterThan(routes.length);
    for (const [place, ref] of refs) expect(resolved(ref), `${ref} at ${place}`).toBeDefined();
  });

  it('has no component that nothing refers to', () => {
    const text = JSON.stringify(document);
    for (const name of Object.keys(document.components.schemas)) {
      expect(text, name).toContain(`"#/components/schemas/${name}"`);
    }
  });

  it('holds schemas that a strict JSON Schema validator compiles, with no id of their own', () => {
    const ajv = new Ajv2020({ strict: true, allowUnionTypes: true });
    addFormats(ajv);
    for (const [name, schema] of Object.entries(document.components.schemas)) {
      expect(() => ajv.compile(schema), name).not.toThrow();
    }
    expect(objectsIn(document).filter(({ value }) => typeof value['$id'] === 'string')).toEqual([]);
  });

  it('names no two different schemas alike', () => {
    const byId = new Map<string, string>();
    const named = routes.flatMap(({ body, response }) => [body, response.schema]).filter(isNamed);
    for (const schema of named) {
      const text = JSON.stringify(schema);
      expect(byId.get(schema.$id) ?? text, schema.$id).toBe(text);
      byId.set(schema.$id, text);
    }
    expect(byId.size).toBeGreaterThan(10);
  });

  it.each(routes.map((route) => [route.operationId, route] as const))('tells all of %s', (_name, route) => {
    const path = route.path.replaceAll(/:(\w+)/g, '{$1}');
    const operation = document.paths[path]?.[route.method];
    if (operation === undefined) throw new Error('it is not in the document');
    expect(operation.summary.length).toBeGreaterThan(5);

    const inPath = operation.parameters.filter((parameter) => parameter.in === 'path');
    expect(inPath.map(({ name }) => `{${name}}`).sort()).toEqual((path.match(/\{\w+\}/g) ?? []).sort());
    expect(inPath.every(({ required }) => required)).toBe(true);
    const hasIfMatch = operation.parameters.some(({ name }) => name === 'If-Match');
    expect(hasIfMatch).toBe(route.ifMatch === true);

    expect(operation.security !== undefined).toBe(route.access.kind !== 'public');
    expect(operation['x-permission']).toBe(
      route.access.kind === 'team' ? route.access.permission : undefined,
    );
    expect(operation.requestBody !== undefined).toBe(route.body !== undefined);
    const success = operation.responses[String(route.response.status)];
    expect(success?.content !== undefined).toBe(route.response.schema !== null);
    expect(operation.responses['default']?.content).toHaveProperty('application/problem+json');
  });
});

function isNamed(schema: TSchema | null | undefined): schema is TSchema & { $id: string } {
  return schema?.$id !== undefined;
}

describe('the contracts', () => {
  it('of requests let no unknown member pass', () => {
    for (const { operationId, body, query } of routes) {
      for (const schema of [body, query]) {
        if (schema) expect(schema['additionalProperties'], operationId).toBe(false);
      }
    }
  });

  it('of requests limit every number, text and list', () => {
    const unlimited = routes.flatMap(({ operationId, body }) =>
      objectsIn(body).flatMap(({ place, value }) => {
        const isLimited =
          value['type'] === 'string'
            ? ['maxLength', 'enum', 'const', 'format', 'pattern'].some((keyword) => keyword in value)
            : value['type'] === 'array'
              ? 'maxItems' in value
              : ['number', 'integer'].includes(String(value['type']))
                ? 'maximum' in value || 'exclusiveMaximum' in value
                : true;
        return isLimited ? [] : [`${operationId} ${place}`];
      }),
    );
    expect(unlimited).toEqual([]);
  });
});
