import type {
  Ingredient,
  IngredientImportPreview,
  IngredientImportRequest,
  IngredientImportResult,
  IngredientListQuery,
  IngredientPage,
  IngredientWrite,
} from '#shared/contracts/ingredient.ts';
import { request } from './http.ts';

function ingredientsPath(teamId: string): string {
  return `/teams/${teamId}/ingredients`;
}

export function listIngredients(
  teamId: string,
  query: IngredientListQuery,
  signal?: AbortSignal,
): Promise<IngredientPage> {
  return request({ method: 'GET', path: ingredientsPath(teamId), query, signal });
}

export function getIngredient(teamId: string, ingredientId: string): Promise<Ingredient> {
  return request({ method: 'GET', path: `${ingredientsPath(teamId)}/${ingredientId}` });
}

export function createIngredient(teamId: string, body: IngredientWrite): Promise<Ingredient> {
  return request({ method: 'POST', path: ingredientsPath(teamId), body });
}

/** An edit names the ingredient with the revision it was based on. */
type Based = Pick<Ingredient, 'id' | 'revision'>;

export function updateIngredient(teamId: string, based: Based, body: IngredientWrite): Promise<Ingredient> {
  const path = `${ingredientsPath(teamId)}/${based.id}`;
  return request({ method: 'PUT', path, body, ifMatch: based.revision });
}

export function retireIngredient(teamId: string, based: Based): Promise<Ingredient> {
  const path = `${ingredientsPath(teamId)}/${based.id}/retire`;
  return request({ method: 'POST', path, ifMatch: based.revision });
}

export function restoreIngredient(teamId: string, based: Based): Promise<Ingredient> {
  const path = `${ingredientsPath(teamId)}/${based.id}/restore`;
  return request({ method: 'POST', path, ifMatch: based.revision });
}

/** What an import would do; writes nothing. */
export function previewIngredientImport(
  teamId: string,
  body: IngredientImportRequest,
): Promise<IngredientImportPreview> {
  return request({ method: 'POST', path: `${ingredientsPath(teamId)}/import/preview`, body });
}

export function importIngredients(
  teamId: string,
  body: IngredientImportRequest,
): Promise<IngredientImportResult> {
  return request({ method: 'POST', path: `${ingredientsPath(teamId)}/import`, body });
}

/** Address of the export, for a plain download link. */
export function ingredientsCsvUrl(teamId: string): string {
  return `/api${ingredientsPath(teamId)}.csv`;
}
