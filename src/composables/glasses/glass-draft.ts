import type { Glass, GlassWrite } from '#shared/contracts/glass.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import { GLASS_RANGES } from '#shared/physics/glass.ts';
import { numberFromText, textFromNumber } from '#src/composables/ingredients/field-text.ts';

/** A point as it is measured with a rule: height above the bottom, and the width across at that height. */
export interface ProfilePointDraft {
  heightText: string;
  widthText: string;
}

export interface GlassDraft {
  name: string;
  points: ProfilePointDraft[];
  stemText: string;
}

export type GlassWriteResult = { ok: true; body: GlassWrite } | { ok: false; errors: FieldError[] };

/** A plain straight-sided glass to start from. */
export function emptyGlassDraft(): GlassDraft {
  return {
    name: '',
    points: [
      { heightText: '0', widthText: '60' },
      { heightText: '90', widthText: '72' },
    ],
    stemText: '0',
  };
}

export function draftFromGlass(glass: Glass): GlassDraft {
  return {
    name: glass.name,
    points: glass.profile.map((point) => ({
      heightText: textFromNumber(point.heightMm),
      widthText: textFromNumber(2 * point.radiusMm),
    })),
    stemText: textFromNumber(glass.stemMm),
  };
}

/** The glass to be saved, or what is wrong with the draft field by field. */
export function glassFromDraft(draft: GlassDraft): GlassWriteResult {
  const errors: FieldError[] = [];
  const read = (input: { text: string; pointer: string; max: number; name: string }): number => {
    const value = numberFromText(input.text);
    if (value !== null && value >= 0 && value <= input.max) return value;
    errors.push({
      pointer: input.pointer,
      code: 'out-of-range',
      detail: `${input.name}: a number from 0 to ${input.max}.`,
    });
    return 0;
  };

  const name = draft.name.trim();
  if (name === '')
    errors.push({ pointer: '#/name', code: 'missing', detail: 'Name: give the glass a name.' });
  const profile = draft.points.map((point, index) => ({
    heightMm: read({
      text: point.heightText,
      pointer: `#/profile/${index}/heightMm`,
      max: GLASS_RANGES.heightMm.max,
      name: 'Height',
    }),
    radiusMm:
      read({
        text: point.widthText,
        pointer: `#/profile/${index}/radiusMm`,
        max: 2 * GLASS_RANGES.radiusMm.max,
        name: 'Width',
      }) / 2,
  }));
  const stemMm = read({ text: draft.stemText, pointer: '#/stemMm', max: 250, name: 'Foot and stem' });
  if (errors.length === 0) errors.push(...risingErrors(profile));
  return errors.length > 0 ? { ok: false, errors } : { ok: true, body: { name, profile, stemMm } };
}

/** Heights must rise from point to point, or the solid turned from them makes no sense. */
function risingErrors(profile: GlassWrite['profile']): FieldError[] {
  return profile.flatMap((point, index) => {
    const below = profile[index - 1];
    if (below === undefined || point.heightMm > below.heightMm) return [];
    return [
      {
        pointer: `#/profile/${index}/heightMm`,
        code: 'not-rising',
        detail: `Height: more than the point below it, ${below.heightMm} mm.`,
      },
    ];
  });
}
