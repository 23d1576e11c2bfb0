import { type TSchema, Type } from '@sinclair/typebox';

import { ProblemSchema } from '#shared/contracts/problem.ts';

import { type AnyRoute, PUBLIC, route } from './route.ts';

type JsonObject = Record<string, unknown>;

/** The OpenAPI 3.1 document of the routes: schemas are the contracts themselves. */
export function openApiDocument(routes: readonly AnyRoute[]): JsonObject {
  const schemas: JsonObject = { Problem: withoutId(ProblemSchema) };
  const paths: Record<string, JsonObject> = {};
  for (const definition of routes) {
    const path = definition.path.replaceAll(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[definition.method] = operationOf(definition, schemas);
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Oxymel',
      version: '1',
      description: 'Quantities are in g, mL, C and fractions. Errors are problem details (RFC 9457).',
    },
    servers: [{ url: '/api' }],
    paths,
    components: {
      schemas,
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'oxymel_session' } },
    },
  };
}

function operationOf(definition: AnyRoute, schemas: JsonObject): JsonObject {
  return {
    operationId: definition.operationId,
    summary: definition.summary,
    tags: [definition.tag],
    ...(definition.access.kind === 'public' ? {} : { security: [{ session: [] }] }),
    ...(definition.access.kind === 'team' ? { 'x-permission': definition.access.permission } : {}),
    parameters: parametersOf(definition),
    ...(definition.body
      ? {
          requestBody: {
            required: true,
            content: { 'application/json': { schema: refTo(definition.body, schemas) } },
          },
        }
      : {}),
    responses: responsesOf(definition, schemas),
  };
}

function parametersOf(definition: AnyRoute): JsonObject[] {
  const members = (schema: TSchema | undefined, place: 'path' | 'query') =>
    Object.entries((schema?.['properties'] ?? {}) as Record<string, TSchema>).map(([name, member]) => ({
      name,
      in: place,
      required: place === 'path',
      schema: member,
    }));
  const ifMatch = {
    name: 'If-Match',
    in: 'header',
    required: true,
    description: 'the revision the edit is based on, in quotes',
    schema: { type: 'string', pattern: '^(W/)?"\\d{1,9}"$' },
  };
  return [
    ...members(definition.params, 'path'),
    ...members(definition.query, 'query'),
    ...(definition.ifMatch ? [ifMatch] : []),
  ];
}

function responsesOf({ response }: AnyRoute, schemas: JsonObject): JsonObject {
  const success =
    response.schema === null
      ? { description: 'done' }
      : {
          description: 'done',
          content: {
            [response.contentType ?? 'application/json']: { schema: refTo(response.schema, schemas) },
          },
        };
  return {
    [response.status]: success,
    default: {
      description: 'a problem',
      content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
    },
  };
}

/** Puts a named schema among the components once and refers to it; an unnamed one stays in place. */
function refTo(schema: TSchema, schemas: JsonObject): JsonObject {
  if (schema.$id === undefined) return withoutId(schema);
  schemas[schema.$id] = withoutId(schema);
  return { $ref: `#/components/schemas/${schema.$id}` };
}

/** A copy without any `$id`, also inside: in OpenAPI a component's name is its place. */
function withoutId(schema: TSchema): JsonObject {
  const text = JSON.stringify(schema, (key, value: unknown) => (key === '$id' ? undefined : value));
  return JSON.parse(text) as JsonObject;
}

/** The document as docs/openapi.json holds it. */
export function openApiText(routes: readonly AnyRoute[]): string {
  return `${JSON.stringify(openApiDocument(routes), null, 2)}\n`;
}

export function openApiRoutes(routes: readonly AnyRoute[]): AnyRoute[] {
  const self = route({
    operationId: 'getOpenApi',
    method: 'get',
    path: '/openapi.json',
    summary: 'This document',
    tag: 'System',
    access: PUBLIC,
    response: { status: 200, schema: Type.Object({}, { description: 'an OpenAPI 3.1 document' }) },
    handler: () => Promise.resolve({ body: document }),
  });
  const document = openApiDocument([...routes, self]);
  return [self];
}
