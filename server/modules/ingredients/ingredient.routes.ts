import { Type } from '@sinclair/typebox';

import { Uuid } from '#shared/contracts/common.ts';
import {
  IngredientImportPreviewSchema,
  IngredientImportRequestSchema,
  IngredientImportResultSchema,
  IngredientListQuerySchema,
  IngredientPageSchema,
  IngredientSchema,
  IngredientWriteSchema,
} from '#shared/contracts/ingredient.ts';

import { type AnyRoute, inTeam, route } from '../../http/route.ts';
import { applyImport, exportIngredients, previewImport } from './import.service.ts';
import { toIngredient } from './ingredient.mapper.ts';
import { listIngredients, loadIngredient } from './ingredient.queries.ts';
import { addIngredient, changeIngredient, setIngredientRetired } from './ingredient.service.ts';

const tag = 'Ingredients';
const teamParams = Type.Object({ teamId: Uuid });
const ingredientParams = Type.Object({ teamId: Uuid, ingredientId: Uuid });

/** A CSV of the allowed number of characters, each of up to four bytes, and what JSON adds to it. */
const IMPORT_BODY_LIMIT = '5mb';

export const ingredientRoutes: AnyRoute[] = [
  route({
    operationId: 'listIngredients',
    method: 'get',
    path: '/teams/:teamId/ingredients',
    summary: 'A page of the back bar',
    tag,
    access: inTeam('read'),
    params: teamParams,
    query: IngredientListQuerySchema,
    response: { status: 200, schema: IngredientPageSchema },
    handler: async ({ em, teamId, roles }, { query }) => {
      const { items, nextCursor } = await listIngredients(em, { teamId, query });
      return { body: { items: items.map((item) => toIngredient(item, roles)), nextCursor } };
    },
  }),
  route({
    operationId: 'createIngredient',
    method: 'post',
    path: '/teams/:teamId/ingredients',
    summary: 'Add an ingredient',
    tag,
    access: inTeam('edit-ingredients'),
    params: teamParams,
    body: IngredientWriteSchema,
    response: { status: 201, schema: IngredientSchema },
    handler: async (context, { body }) => {
      const ingredient = await addIngredient(context, body);
      return { body: ingredient, revision: ingredient.revision };
    },
  }),
  route({
    operationId: 'exportIngredients',
    method: 'get',
    path: '/teams/:teamId/ingredients.csv',
    summary: 'The back bar in use as CSV, which the import takes back',
    tag,
    access: inTeam('edit-ingredients'),
    params: teamParams,
    response: { status: 200, schema: Type.String(), contentType: 'text/csv' },
    handler: async (context) => ({
      body: await exportIngredients(context),
      headers: { 'Content-Disposition': 'attachment; filename="ingredients.csv"' },
    }),
  }),
  route({
    operationId: 'previewIngredientImport',
    method: 'post',
    path: '/teams/:teamId/ingredients/import/preview',
    summary: 'What an import would do; writes nothing',
    tag,
    access: inTeam('edit-ingredients'),
    params: teamParams,
    body: IngredientImportRequestSchema,
    bodyLimit: IMPORT_BODY_LIMIT,
    response: { status: 200, schema: IngredientImportPreviewSchema },
    handler: async (context, { body }) => ({ body: await previewImport(context, body) }),
  }),
  route({
    operationId: 'importIngredients',
    method: 'post',
    path: '/teams/:teamId/ingredients/import',
    summary: 'Add and change ingredients from CSV: rows without errors, in one transaction',
    tag,
    access: inTeam('edit-ingredients'),
    params: teamParams,
    body: IngredientImportRequestSchema,
    bodyLimit: IMPORT_BODY_LIMIT,
    response: { status: 200, schema: IngredientImportResultSchema },
    handler: async (context, { body }) => ({ body: await applyImport(context, body) }),
  }),
  route({
    operationId: 'getIngredient',
    method: 'get',
    path: '/teams/:teamId/ingredients/:ingredientId',
    summary: 'One ingredient',
    tag,
    access: inTeam('read'),
    params: ingredientParams,
    response: { status: 200, schema: IngredientSchema },
    handler: async ({ em, teamId, roles }, { params }) => {
      const ingredient = await loadIngredient(em, { teamId, ingredientId: params.ingredientId });
      return { body: toIngredient(ingredient, roles), revision: ingredient.revision };
    },
  }),
  route({
    operationId: 'updateIngredient',
    method: 'put',
    path: '/teams/:teamId/ingredients/:ingredientId',
    summary: 'Change an ingredient; versions keep the composition they were saved with',
    tag,
    access: inTeam('edit-ingredients'),
    params: ingredientParams,
    body: IngredientWriteSchema,
    ifMatch: true,
    response: { status: 200, schema: IngredientSchema },
    handler: async (context, { params, body, ifMatch }) => {
      const { ingredientId } = params;
      const ingredient = await changeIngredient(context, { ingredientId, write: body, ifMatch });
      return { body: ingredient, revision: ingredient.revision };
    },
  }),
  ...(['retire', 'restore'] as const).map((action) =>
    route({
      operationId: `${action}Ingredient`,
      method: 'post',
      path: `/teams/:teamId/ingredients/:ingredientId/${action}`,
      summary: action === 'retire' ? 'Take an ingredient out of use' : 'Bring a retired ingredient back',
      tag,
      access: inTeam('edit-ingredients'),
      params: ingredientParams,
      ifMatch: true,
      response: { status: 200, schema: IngredientSchema },
      handler: async (context, { params, ifMatch }) => {
        const { ingredientId } = params;
        const retired = action === 'retire';
        const ingredient = await setIngredientRetired(context, { ingredientId, retired, ifMatch });
        return { body: ingredient, revision: ingredient.revision };
      },
    }),
  ),
];
