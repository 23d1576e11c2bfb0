import type { DraftBody } from '../contracts/spec.ts';

/** What one part is in a new spec [mL]: an ounce jigger's worth in a metric bar. */
const NEW_PART_ML = 30;

/** The draft of a spec that was just begun: no lines, shaken over cubes, strained into no glass yet. */
export function blankDraft(): DraftBody {
  return {
    lines: [],
    method: 'shake',
    dilution: { kind: 'published' },
    ice: 'cubes',
    glassId: null,
    glassIce: { kind: 'none', massG: 0 },
    garnish: '',
    build: [],
    partMl: NEW_PART_ML,
  };
}
