/**
 * Dilution: how much melt water a drink takes up, from one of four kinds of knowledge.
 *
 * D dilution, melt water ÷ undiluted volume, both at 20 C [mL/mL]; a strength of the undiluted mix [0 to 1]. The published
 * curves were fitted to about 120 g of ice at 0 C, shaken 10 s or stirred 15 s, drinks from 20 C; they say nothing about
 * other ice, times or starting temperatures. Sources: arnold-2014 (docs/sources/dilution.md).
 */
import { requireNotNegative, requireWithin } from './domain-error.ts';
import { WATER_DENSITY_G_PER_ML } from './ethanol-water.ts';
import type { CalculationWarning } from './warning.ts';

export const METHODS = ['shake', 'stir', 'build', 'throw', 'swizzle', 'blend', 'pre-batch'] as const;
export type Method = (typeof METHODS)[number];

export const DILUTION_RANGES = {
  /** Melt water ÷ undiluted volume, set by hand. */
  dilutionFraction: { min: 0, max: 3 },
  massG: { exclusiveMin: 0, max: 100_000 },
} as const;

/** Strengths that ordinary recipes span: the usable range of a curve [0 to 1]. From memory. */
export interface PublishedCurve {
  /** D = square a² + linear a + constant. */
  readonly square: number;
  readonly linear: number;
  readonly constant: number;
  readonly usableAbvFraction: { readonly min: number; readonly max: number };
  /** Strength at the top of the parabola; beyond it the value at the top is used [0 to 1]. */
  readonly peakAbvFraction: number;
}

/** Published as equations of the strength of the mix. */
export const PUBLISHED_CURVES: Readonly<Partial<Record<Method, PublishedCurve>>> = {
  shake: {
    square: -1.567,
    linear: 1.742,
    constant: 0.203,
    usableAbvFraction: { min: 0.15, max: 0.35 },
    peakAbvFraction: 1.742 / (2 * 1.567),
  },
  stir: {
    square: -1.21,
    linear: 1.246,
    constant: 0.145,
    usableAbvFraction: { min: 0.2, max: 0.45 },
    peakAbvFraction: 1.246 / (2 * 1.21),
  },
};

/** Published as one value, whatever the strength. */
export const PUBLISHED_FLAT_DILUTION: Readonly<Partial<Record<Method, number>>> = { build: 0.24, blend: 0.9 };

/** How far a weighed starting mass may be from what the lines make before it is worth a warning [1]. */
export const WEIGHED_MASS_AGREEMENT = 0.1;

/** Where the dilution comes from; the same shape as the contract's. */
export type DilutionInput =
  | { readonly kind: 'published' }
  | { readonly kind: 'weighed'; readonly massBeforeG: number; readonly massAfterG: number }
  | { readonly kind: 'by hand'; readonly dilutionFraction: number }
  | { readonly kind: 'none' };

/** The mix before ice. */
export interface UndilutedMix {
  readonly volumeMl: number;
  readonly massG: number;
  readonly abvFraction: number;
}

export type Dilution =
  | { readonly ok: true; readonly fraction: number; readonly warnings: readonly CalculationWarning[] }
  | { readonly ok: false; readonly reason: 'no-published-curve'; readonly method: Method };

function beyondCurve(input: {
  method: Method;
  abvFraction: number;
  curve: PublishedCurve;
}): CalculationWarning {
  const { min, max } = input.curve.usableAbvFraction;
  return {
    code: 'extrapolated',
    quantity: 'undilutedAbvFraction',
    value: input.abvFraction,
    min,
    max,
    detail:
      input.abvFraction > input.curve.peakAbvFraction
        ? `The mix is stronger than the published ${input.method} curve serves: its greatest dilution is used.`
        : `The mix is outside the strengths that the published ${input.method} curve was made for.`,
  };
}

/**
 * Dilution by the published curve of a method.
 *
 * Formula:   shake D = -1.567 a² + 1.742 a + 0.203; stir D = -1.21 a² + 1.246 a + 0.145; build 0.24; blend 0.9
 * @param input.method        how the drink is mixed
 * @param input.abvFraction   strength of the undiluted mix at 20 C [0 to 1]
 * @returns                   melt water ÷ undiluted volume [mL/mL] with warnings, or no-published-curve
 * Range:     shake 0.15 to 0.35, stir 0.2 to 0.45 (from memory): outside there is a warning. Beyond the top of the
 *            parabola (0.556 and 0.515) the value at the top is kept: less dilution of a stronger mix is not physical
 * Accuracy:  5 to 10 % of the finished volume, with other ice and hands
 * Limits:    throw, swizzle and pre-batch have no published curve
 * Source:    Dave Arnold, Liquid Intelligence (2014), p. 123, from two transcriptions (docs/sources/dilution.md)
 * @example   publishedDilution({ method: 'shake', abvFraction: 0.25 }).fraction // 0.5406
 */
export function publishedDilution(input: { method: Method; abvFraction: number }): Dilution {
  const { method } = input;
  const a = requireWithin({ quantity: 'undilutedAbvFraction', value: input.abvFraction, min: 0, max: 1 });
  const flat = PUBLISHED_FLAT_DILUTION[method];
  if (flat !== undefined) return { ok: true, fraction: flat, warnings: [] };
  const curve = PUBLISHED_CURVES[method];
  if (curve === undefined) return { ok: false, reason: 'no-published-curve', method };
  const at = Math.min(a, curve.peakAbvFraction);
  const isInside = a >= curve.usableAbvFraction.min && a <= curve.usableAbvFraction.max;
  return {
    ok: true,
    fraction: (curve.square * at + curve.linear) * at + curve.constant,
    warnings: isInside ? [] : [beyondCurve({ method, abvFraction: a, curve })],
  };
}

function weighedWarnings(input: {
  massBeforeG: number;
  massAfterG: number;
  mixMassG: number;
}): CalculationWarning[] {
  const warnings: CalculationWarning[] = [];
  if (input.massAfterG < input.massBeforeG) {
    warnings.push({
      code: 'mass-lost',
      quantity: 'massAfterG',
      value: input.massAfterG,
      min: input.massBeforeG,
      max: null,
      detail: 'Less was strained than went in: some stayed in the shaker, and no melt water is counted.',
    });
  }
  const min = input.mixMassG * (1 - WEIGHED_MASS_AGREEMENT);
  const max = input.mixMassG * (1 + WEIGHED_MASS_AGREEMENT);
  if (input.massBeforeG < min || input.massBeforeG > max) {
    warnings.push({
      code: 'extrapolated',
      quantity: 'massBeforeG',
      value: input.massBeforeG,
      min,
      max,
      detail: 'The liquid that was weighed is not what the lines make: its melt water is scaled to them.',
    });
  }
  return warnings;
}

/**
 * Dilution from a drink weighed before mixing and after straining.
 *
 * Formula:   D = ((m_after - m_before) / m_before) * m_mix / (rho_w * V_mix)
 * @param input.massBeforeG   liquid before mixing [g]
 * @param input.massAfterG    liquid strained [g]
 * @param input.mix           the undiluted mix that the lines make
 * @returns                   melt water ÷ undiluted volume [mL/mL] with warnings
 * Range:     masses above 0 to 100000 g; what was weighed may be several serves
 * Accuracy:  that of the scale; ±1 g on a serve of 100 g is ±0.01
 * Limits:    what stays on the ice and in the tin is taken for missing melt water: tare and strain with care
 * Source:    mass balance; water density from OIML R 22
 * @example   weighedDilution({ massBeforeG: 100, massAfterG: 150, mix: { volumeMl: 100, massG: 100, abvFraction: 0.2 } }).fraction // 0.5009
 */
export function weighedDilution(input: {
  massBeforeG: number;
  massAfterG: number;
  mix: UndilutedMix;
}): Dilution & { readonly ok: true } {
  const bounds = { min: Number.MIN_VALUE, max: DILUTION_RANGES.massG.max };
  const massBeforeG = requireWithin({ quantity: 'massBeforeG', value: input.massBeforeG, ...bounds });
  const massAfterG = requireWithin({ quantity: 'massAfterG', value: input.massAfterG, ...bounds });
  const mixMassG = requireNotNegative({ quantity: 'mix.massG', value: input.mix.massG });
  const meltPerMass = Math.max(0, massAfterG - massBeforeG) / massBeforeG;
  return {
    ok: true,
    fraction: (meltPerMass * mixMassG) / WATER_DENSITY_G_PER_ML / input.mix.volumeMl,
    warnings: weighedWarnings({ massBeforeG, massAfterG, mixMassG }),
  };
}

/**
 * Dilution of a mix, from whichever kind of knowledge was chosen.
 *
 * Formula:   published curve, weighed, set by hand, or 0
 * @param input.choice   where the dilution comes from
 * @param input.method   how the drink is mixed
 * @param input.mix      the undiluted mix that the lines make
 * @returns              melt water ÷ undiluted volume [mL/mL] with warnings, or no-published-curve
 * Range:     a mix of more than 0 mL; by hand 0 to 3
 * Accuracy:  that of the choice
 * Limits:    those of the choice
 * Source:    docs/sources/dilution.md
 * @example   dilutionOf({ choice: { kind: 'by hand', dilutionFraction: 0.4 }, method: 'throw', mix: { volumeMl: 90, massG: 92, abvFraction: 0.3 } }).fraction // 0.4
 */
export function dilutionOf(input: { choice: DilutionInput; method: Method; mix: UndilutedMix }): Dilution {
  const { choice, method, mix } = input;
  switch (choice.kind) {
    case 'published':
      return publishedDilution({ method, abvFraction: mix.abvFraction });
    case 'weighed':
      return weighedDilution({ massBeforeG: choice.massBeforeG, massAfterG: choice.massAfterG, mix });
    case 'by hand': {
      const { min, max } = DILUTION_RANGES.dilutionFraction;
      const value = choice.dilutionFraction;
      const fraction = requireWithin({ quantity: 'dilutionFraction', value, min, max });
      return { ok: true, fraction, warnings: [] };
    }
    case 'none':
      return { ok: true, fraction: 0, warnings: [] };
  }
}
