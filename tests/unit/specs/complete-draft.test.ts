import { describe, expect, it } from 'vitest';

import { completeDraft, draftFromBody } from '#shared/specs/complete-draft.ts';
import {
  LIME_ID,
  RUM_ID,
  SYRUP_ID,
  aDraft,
  aDraftLine,
  aLine,
  aSpecBody,
  anId,
  frozen,
} from '#tests/support/builders.ts';

const emptyLine = aDraftLine({ id: anId(9), ingredientId: null, amountText: ' ', note: '' });

describe('a draft that is complete', () => {
  it('becomes a spec with its amounts read and everything else as it was', () => {
    const result = completeDraft(frozen(aDraft()));
    expect(result).toEqual({
      ok: true,
      body: aSpecBody({
        lines: [
          aLine({ id: anId(1), ingredientId: RUM_ID, amount: { value: 60, unit: 'ml' } }),
          aLine({ id: anId(2), ingredientId: LIME_ID, amount: { value: 22.5, unit: 'ml' } }),
          aLine({ id: anId(3), ingredientId: SYRUP_ID, amount: { value: 0.75, unit: 'oz' } }),
        ],
      }),
    });
  });

  it('takes a number without a unit for millilitres', () => {
    const result = completeDraft(aDraft({ lines: [aDraftLine({ amountText: '22,5' })] }));
    expect(result.ok && result.body.lines[0]?.amount).toEqual({ value: 22.5, unit: 'ml' });
  });

  it('leaves out empty lines and empty steps, and trims words', () => {
    const line = aDraftLine({ note: ' fresh ' });
    const draft = aDraft({
      lines: [emptyLine, line, emptyLine],
      build: [' Shake. ', '  '],
      garnish: ' mint ',
    });
    const result = completeDraft(frozen(draft));
    expect(result).toMatchObject({ ok: true, body: { build: ['Shake.'], garnish: 'mint' } });
    expect(result.ok && result.body.lines).toEqual([aLine({ note: 'fresh' })]);
  });

  it('lets no member through that a spec does not have', () => {
    const draft = { ...aDraft(), extra: 'x' };
    const result = completeDraft(draft);
    expect(result.ok && Object.keys(result.body).sort()).toEqual(Object.keys(aSpecBody()).sort());
  });
});

describe('a draft that is not complete', () => {
  it('names every field in the way by its place in the draft', () => {
    const draft = aDraft({
      lines: [
        emptyLine,
        aDraftLine({ ingredientId: null }),
        aDraftLine({ amountText: 'abc' }),
        aDraftLine({ amountText: '' }),
        aDraftLine({ ingredientId: null, amountText: '', note: 'something sour' }),
      ],
    });
    const result = completeDraft(frozen(draft));
    expect(result.ok).toBe(false);
    expect(result.ok ? [] : result.errors.map(({ pointer, code }) => [pointer, code])).toEqual([
      ['#/lines/1/ingredientId', 'required'],
      ['#/lines/2/amountText', 'unreadable'],
      ['#/lines/3/amountText', 'required'],
      ['#/lines/4/ingredientId', 'required'],
      ['#/lines/4/amountText', 'required'],
    ]);
    expect(result.ok ? '' : result.errors[0]?.detail).toBe('Line 2 has no ingredient.');
  });

  it.each([[[]], [Array.from({ length: 30 }, () => emptyLine)]])(
    'needs at least one line that says something',
    (lines) => {
      expect(completeDraft(aDraft({ lines }))).toEqual({
        ok: false,
        errors: [{ pointer: '#/lines', code: 'min-items', detail: 'A version needs at least one line.' }],
      });
    },
  );

  it.each(['-5', '1e9', '1/0', '0', '1,000.5', '10001 ml', '1 oz 5 ml'])(
    'is one with the amount %j',
    (amountText) => {
      const result = completeDraft(aDraft({ lines: [aDraftLine({ amountText })] }));
      expect(result.ok ? [] : result.errors.map((error) => error.pointer)).toEqual(['#/lines/0/amountText']);
    },
  );
});

describe('the draft of a version', () => {
  it('becomes the same version again', () => {
    const body = frozen(
      aSpecBody({
        lines: [
          aLine({ id: anId(1), amount: { value: 1 / 3, unit: 'oz' } }),
          aLine({ id: anId(2), amount: { value: 2, unit: 'dash' }, stage: 'top', note: 'on the foam' }),
          aLine({ id: anId(3), amount: { value: 0.125, unit: 'bar spoon' } }),
        ],
      }),
    );
    const draft = draftFromBody(body);
    expect(draft.lines.map((line) => line.amountText)).toEqual(['1/3 oz', '2 dashes', '0.125 bar spoon']);
    expect(completeDraft(draft)).toEqual({ ok: true, body });
  });

  it('shares nothing with it that could be edited', () => {
    const body = aSpecBody();
    const draft = draftFromBody(body);
    draft.glassIce.massG = 99;
    draft.build.push('x');
    expect(body.glassIce.massG).toBe(0);
    expect(body.build).toHaveLength(2);
  });
});
