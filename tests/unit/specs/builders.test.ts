import type { TSchema } from '@sinclair/typebox';
import { Ajv2020 } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import { describe, expect, it } from 'vitest';

import { GlassSchema, GlassSnapshotSchema } from '#shared/contracts/glass.ts';
import { IngredientSchema } from '#shared/contracts/ingredient.ts';
import { DraftBodySchema, SpecBodySchema } from '#shared/contracts/spec.ts';
import { FiguresSchema, IngredientSnapshotSchema, VersionSchema } from '#shared/contracts/version.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';
import { evaluateSpec } from '#shared/specs/evaluate-spec.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';
import {
  aDraft,
  aGlass,
  aGlassSnapshot,
  aLimeJuice,
  aSpecBody,
  aSyrup,
  aVersion,
  anIngredient,
  anIngredientSnapshot,
  byId,
  someFigures,
  theSourIngredients,
} from '#tests/support/builders.ts';

const ajv = new Ajv2020({ strict: true, allErrors: true, allowUnionTypes: true });
addFormats(ajv);

function errorsOf(schema: TSchema, value: unknown) {
  const { $id: _omitted, ...rest } = schema;
  const validate = ajv.compile(rest);
  return validate(value) ? [] : validate.errors;
}

const evaluated = evaluateSpec({
  body: aSpecBody(),
  ingredients: byId(theSourIngredients()),
  glass: aGlassSnapshot(),
  houseMeasures: DEFAULT_HOUSE_MEASURES,
});

describe('what the contracts say of it', () => {
  it.each<[string, TSchema, unknown]>([
    ['a blank draft', DraftBodySchema, blankDraft()],
    ['figures that were computed', FiguresSchema, evaluated.figures],
    ['the draft of the builders', DraftBodySchema, aDraft()],
    ['the spec of the builders', SpecBodySchema, aSpecBody()],
    ['the rum of the builders', IngredientSnapshotSchema, anIngredientSnapshot()],
    ['the lime juice of the builders', IngredientSnapshotSchema, aLimeJuice()],
    ['the syrup of the builders', IngredientSnapshotSchema, aSyrup()],
    ['the ingredient of the builders', IngredientSchema, anIngredient()],
    ['the remembered glass of the builders', GlassSnapshotSchema, aGlassSnapshot()],
    ['the glass of the builders', GlassSchema, aGlass()],
    ['the figures of the builders', FiguresSchema, someFigures()],
    ['the version of the builders', VersionSchema, aVersion()],
  ])('%s keeps its contract', (_name, schema, value) => {
    expect(errorsOf(schema, value)).toEqual([]);
  });

  it('is checked at all: a draft without its method is refused', () => {
    const { method: _omitted, ...rest } = aDraft();
    expect(errorsOf(DraftBodySchema, rest)).toHaveLength(1);
  });
});

describe('a blank draft', () => {
  it('is a new one each time, so that nobody writes into another', () => {
    expect(blankDraft()).toEqual(blankDraft());
    expect(blankDraft().lines).not.toBe(blankDraft().lines);
  });
});
