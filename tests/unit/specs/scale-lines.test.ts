import { describe, expect, it } from 'vitest';

import type { SpecEvaluation } from '#shared/specs/evaluate-spec.ts';
import { factorForTotalVolume, scaleDraft } from '#shared/specs/scale-lines.ts';
import { aDraft, aDraftLine, anId, frozen, someFigures } from '#tests/support/builders.ts';

function scaled(texts: string[], factor: number) {
  const lines = texts.map((amountText, index) => aDraftLine({ id: anId(index), amountText }));
  return scaleDraft({ draft: frozen(aDraft({ lines })), factor });
}

describe('scaling the lines of a draft', () => {
  it.each<[string, number, string]>([
    ['22.5 ml', 12, '270 ml'],
    ['22,5', 2, '45 ml'],
    ['3/4 oz', 2, '1.5 oz'],
    ['1½oz', 3, '4.5 oz'],
    ['1/3 oz', 3, '1 oz'],
    ['2 dashes', 0.5, '1 dash'],
    ['1 dash', 12, '12 dashes'],
    ['1 bsp', 3, '3 bar spoons'],
    ['22.5 ml', 1 / 7, '3.214 ml'],
    ['2 parts', 2, '4 parts'],
    ['4 cl', 3, '12 cl'],
  ])('%j × %d is %j', (text, factor, result) => {
    const answer = scaled([text], factor);
    expect(answer.ok && answer.draft.lines[0]?.amountText).toBe(result);
  });

  it('leaves everything else as it is, and lines without an amount too', () => {
    const draft = aDraft({
      lines: [aDraftLine({ amountText: '', note: 'to taste' }), aDraftLine({ id: anId(2) })],
    });
    const answer = scaleDraft({ draft: frozen(draft), factor: 2 });
    expect(answer).toEqual({
      ok: true,
      draft: { ...draft, lines: [draft.lines[0], { ...draft.lines[1], amountText: '120 ml' }] },
    });
  });

  it('by one changes not even how an amount was typed', () => {
    const answer = scaled([' 1½oz'], 1);
    expect(answer.ok && answer.draft.lines[0]?.amountText).toBe(' 1½oz');
  });

  it('is refused where an amount cannot be read, with every such line', () => {
    expect(scaled(['60 ml', 'abc', '-5'], 2)).toMatchObject({
      ok: false,
      errors: [
        { pointer: '#/lines/1/amountText', code: 'unreadable' },
        { pointer: '#/lines/2/amountText', code: 'not-positive' },
      ],
    });
  });

  it('is refused where an amount would leave its limits', () => {
    expect(scaled(['60 ml'], 1000)).toMatchObject({ ok: false, errors: [{ code: 'too-large' }] });
    expect(scaled(['1 drop'], 0.001)).toMatchObject({ ok: true });
    expect(scaled(['0.5 drops'], 0.001)).toMatchObject({ ok: false, errors: [{ code: 'too-small' }] });
  });

  it.each([0, -1, 1001, Number.NaN, Number.POSITIVE_INFINITY])('is refused by the factor %d', (factor) => {
    expect(scaled(['60 ml'], factor)).toMatchObject({ ok: false, errors: [{ pointer: '#/factor' }] });
  });
});

describe('the factor for a wanted volume', () => {
  const line = {
    lineId: anId(1),
    ok: true,
    volumeMl: 60,
    massG: 57,
    ethanolG: 19,
    sugarG: 0,
    acidCitricG: 0,
  } as const;
  const evaluation: SpecEvaluation = frozen({
    figures: someFigures({ finalMl: 150, undilutedMl: 100 }),
    lines: [line],
  });

  it('is wanted ÷ present, of the finished drink or of the mix', () => {
    expect(factorForTotalVolume({ evaluation, targetMl: 1500 })).toEqual({ ok: true, factor: 10 });
    expect(factorForTotalVolume({ evaluation, targetMl: 1500, of: 'undilutedMl' })).toEqual({
      ok: true,
      factor: 15,
    });
  });

  it('is not known while a line cannot be computed; an empty line does not matter', () => {
    const at = (reason: 'empty' | 'no-amount') => ({
      ...evaluation,
      lines: [line, { lineId: anId(2), ok: false, reason, detail: '' } as const],
    });
    expect(factorForTotalVolume({ evaluation: at('no-amount'), targetMl: 150 })).toMatchObject({
      ok: false,
      reason: 'incomplete',
    });
    expect(factorForTotalVolume({ evaluation: at('empty'), targetMl: 150 })).toEqual({ ok: true, factor: 1 });
  });

  it('needs something to scale', () => {
    expect(factorForTotalVolume({ evaluation: { figures: null, lines: [] }, targetMl: 150 })).toMatchObject({
      ok: false,
      reason: 'nothing-computed',
    });
  });

  it.each([0, -5, 1e9, Number.NaN])('is refused for %d mL', (targetMl) => {
    expect(factorForTotalVolume({ evaluation, targetMl })).toMatchObject({
      ok: false,
      reason: 'out-of-range',
    });
  });
});
