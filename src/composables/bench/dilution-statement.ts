/** Which dilution was used, where it comes from and for what it holds, in a sentence. */
import type { DraftBody } from '#shared/contracts/spec.ts';
import type { Figures } from '#shared/contracts/version.ts';
import { type Method, PUBLISHED_CURVES, PUBLISHED_FLAT_DILUTION } from '#shared/physics/dilution.ts';
import { formatAbv, formatDilution } from '#shared/text/format-quantity.ts';

const METHOD_ACTS: Readonly<Record<Method, string>> = {
  shake: 'shaking',
  stir: 'stirring',
  build: 'building',
  throw: 'throwing',
  swizzle: 'swizzling',
  blend: 'blending',
  'pre-batch': 'pre-batching',
};

/** Whether anything is published for a method. */
export function hasPublishedDilution(method: Method): boolean {
  return PUBLISHED_CURVES[method] !== undefined || PUBLISHED_FLAT_DILUTION[method] !== undefined;
}

function publishedStatement(method: Method): string {
  const curve = PUBLISHED_CURVES[method];
  if (curve !== undefined) {
    const { min, max } = curve.usableAbvFraction;
    return `The published curve for ${METHOD_ACTS[method]}, made for mixes of ${formatAbv(min)} to ${formatAbv(max)} before ice.`;
  }
  return hasPublishedDilution(method)
    ? `The published value for ${METHOD_ACTS[method]}, the same at any strength.`
    : `Nothing is published for ${METHOD_ACTS[method]}: no melt water is counted. Weigh it, or set it by hand.`;
}

/** What stands under the choice of the dilution. */
export function dilutionStatement(input: {
  readonly draft: Pick<DraftBody, 'method' | 'dilution'>;
  readonly figures: Pick<Figures, 'dilutionFraction' | 'undilutedAbvFraction'> | null;
}): string {
  const { draft, figures } = input;
  const sentences: Record<DraftBody['dilution']['kind'], string> = {
    published: publishedStatement(draft.method),
    weighed: 'From what was weighed before mixing and after straining, scaled to these lines.',
    'by hand': 'Set by hand: melt water ÷ undiluted volume.',
    none: 'No melt water.',
  };
  const used =
    figures === null || draft.dilution.kind === 'none'
      ? ''
      : ` Used: ${formatDilution(figures.dilutionFraction)} for a mix of ${formatAbv(figures.undilutedAbvFraction)}.`;
  return `${sentences[draft.dilution.kind]}${used}`;
}
