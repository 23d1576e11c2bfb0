import fc from 'fast-check';

import { ACID_KEYS, type AcidKey, type Composition } from '#shared/physics/composition.ts';
import {
  type Contents,
  computedDensityGPerMl,
  contentsPerMl,
  fitOfComposition,
} from '#shared/physics/contents.ts';
import { DILUTION_RANGES, type DilutionInput, METHODS, type Method } from '#shared/physics/dilution.ts';
import type { Profile } from '#shared/physics/glass.ts';
import type { Portion } from '#shared/physics/mixing.ts';

/** Generators of physical things. Every number has limits, and a reason for them. */

export function between(min: number, max: number): fc.Arbitrary<number> {
  return fc.double({ min, max, noNaN: true, noDefaultInfinity: true });
}

/** 0 to 1, with the ends themselves often. */
export function fraction(): fc.Arbitrary<number> {
  return fc.oneof({ weight: 1, arbitrary: fc.constantFrom(0, 1) }, { weight: 9, arbitrary: between(0, 1) });
}

/** What bars pour: from a drop of bitters to a jug. */
export function volumeMl(): fc.Arbitrary<number> {
  return between(0.05, 2000);
}

/** Acids as drinks and stock solutions hold them; most liquids hold none or two. */
function acidsGPerL(): fc.Arbitrary<Partial<Record<AcidKey, number>>> {
  const some = fc
    .subarray([...ACID_KEYS], { maxLength: 2 })
    .chain((keys) =>
      fc
        .array(between(0, 120), { minLength: keys.length, maxLength: keys.length })
        .map((values) => Object.fromEntries(keys.map((key, index) => [key, values[index]!]))),
    );
  return fc.oneof(fc.constant({}), some);
}

/** Liquids of known composition and no known density. Sugar is limited so that it fits beside the ethanol. */
export function computedComposition(): fc.Arbitrary<Composition> {
  return fc
    .record({ abvFraction: fraction(), sugarShare: fraction(), acidsGPerL: acidsGPerL() })
    .map(({ abvFraction, sugarShare, acidsGPerL: acids }) => ({
      abvFraction,
      sugarGPerL: sugarShare * 1100 * (1 - abvFraction),
      acidsGPerL: abvFraction > 0.9 ? {} : acids,
      densityGPerMl: null,
    }))
    .filter((composition) => fitOfComposition(composition).ok);
}

/** Liquids whose density was measured: up to 4 % lighter (cream) and 12 % heavier (saline) than their composition explains. */
export function measuredComposition(): fc.Arbitrary<Composition> {
  return fc
    .record({ composition: computedComposition(), ratio: between(0.96, 1.12) })
    .map(({ composition, ratio }) => ({
      ...composition,
      densityGPerMl: Math.max(0.78, computedDensityGPerMl(composition) * ratio),
    }))
    .filter((composition) => fitOfComposition(composition).ok);
}

export function composition(): fc.Arbitrary<Composition> {
  return fc.oneof(computedComposition(), measuredComposition());
}

export function liquid(): fc.Arbitrary<Contents> {
  return composition().map(contentsPerMl);
}

export function portion(): fc.Arbitrary<Portion> {
  return fc.record({ contentsPerMl: liquid(), volumeMl: volumeMl() });
}

/** As many lines as ordinary specs have. */
export function portions(): fc.Arbitrary<Portion[]> {
  return fc.array(portion(), { minLength: 1, maxLength: 8 });
}

export function method(): fc.Arbitrary<Method> {
  return fc.constantFrom(...METHODS);
}

export function dilutionChoice(): fc.Arbitrary<DilutionInput> {
  const { min, max } = DILUTION_RANGES.dilutionFraction;
  return fc.oneof(
    fc.constant<DilutionInput>({ kind: 'published' }),
    fc.constant<DilutionInput>({ kind: 'none' }),
    between(min, max).map((dilutionFraction): DilutionInput => ({ kind: 'by hand', dilutionFraction })),
    fc
      .record({ massBeforeG: between(1, 500), meltG: between(0, 500) })
      .map(({ massBeforeG, meltG }): DilutionInput => ({
        kind: 'weighed',
        massBeforeG,
        massAfterG: massBeforeG + meltG,
      })),
  );
}

/** Glasses: 2 to 12 points that rise by 1 to 40 mm, radii from a stem's 0 to a bowl's 80 mm. The brim is open. */
export function profile(): fc.Arbitrary<Profile> {
  const step = fc.record({ riseMm: between(1, 30), radiusMm: between(1, 80) });
  return fc
    .record({ bottomRadiusMm: between(0, 60), steps: fc.array(step, { minLength: 1, maxLength: 11 }) })
    .map(({ bottomRadiusMm, steps }) => {
      let heightMm = 0;
      const points = steps.map(({ riseMm, radiusMm }) => ({ heightMm: (heightMm += riseMm), radiusMm }));
      return [{ heightMm: 0, radiusMm: bottomRadiusMm }, ...points];
    });
}
