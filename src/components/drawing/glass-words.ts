/** The glass in words: what the drawing says to somebody who does not see it, and the labels beside it. */
import { type VolumeUnit, formatLength, formatMass, formatVolume } from '#shared/text/format-quantity.ts';
import type { GlassContents, GlassIce, LiquidPart } from './glass-contents.ts';
import type { DrawnGlass } from './glass-outline.ts';

/** Another drink poured into the same glass, to compare with. */
export interface GlassGhost {
  readonly name: string;
  readonly finalMl: number;
}

export interface PourTolerance {
  readonly toleranceMl: number;
  /** What kind of tolerance, such as `legal measure tolerance`. */
  readonly name: string;
}

export const PART_NAMES: Readonly<Record<LiquidPart, string>> = {
  undiluted: 'undiluted',
  melt: 'melt water',
  top: 'topped up',
};

const ICE_NAMES = { cubes: 'ice cubes', block: 'a block of ice', crushed: 'crushed ice' } as const;

interface WordsInput {
  readonly glass: DrawnGlass;
  readonly brimMl: number;
  readonly contents: GlassContents | null;
  readonly finalMl: number | null;
  readonly ice: GlassIce | null;
  readonly ghost: GlassGhost | null;
  readonly tolerance: PourTolerance | null;
  readonly volumeUnit: VolumeUnit;
}

export function overflowWords(input: { overflowMl: number; volumeUnit: VolumeUnit }): string {
  return `Overflows: ${formatVolume({ volumeMl: input.overflowMl, unit: input.volumeUnit })} over the brim`;
}

export function glassTitle(input: Pick<WordsInput, 'glass' | 'finalMl' | 'volumeUnit'>): string {
  const { glass, finalMl, volumeUnit } = input;
  return finalMl === null
    ? `${glass.name}, empty`
    : `${glass.name} with ${formatVolume({ volumeMl: finalMl, unit: volumeUnit })}`;
}

/** Every fact of the drawing, in sentences. */
export function glassDescription(input: WordsInput): string {
  const { contents, volumeUnit: unit } = input;
  const volume = (volumeMl: number): string => formatVolume({ volumeMl, unit });
  const sentences = [`Section drawn to scale; it holds ${volume(input.brimMl)} to the brim.`];
  if (contents !== null && contents.layers.length > 0) {
    const parts = contents.layers.map(({ part, volumeMl }) => `${PART_NAMES[part]} ${volume(volumeMl)}`);
    sentences.push(`In it: ${parts.join(', ')}.`);
    sentences.push(
      contents.overflowMl > 0
        ? `${overflowWords({ overflowMl: contents.overflowMl, volumeUnit: unit })}.`
        : `The wash line stands ${formatLength(contents.washLine.heightMm)} above the bottom, ${volume(contents.washLine.headroomMl)} below the brim.`,
    );
  }
  sentences.push(...iceSentences(input.ice));
  const { tolerance, ghost } = input;
  if (tolerance !== null) sentences.push(`${tolerance.name}: ± ${volume(tolerance.toleranceMl)}.`);
  if (ghost !== null) sentences.push(`To compare: ${ghost.name}, ${volume(ghost.finalMl)}.`);
  return sentences.join(' ');
}

function iceSentences(ice: GlassIce | null): string[] {
  if (ice === null || ice.kind === 'none') return [];
  if (ice.massG <= 0) return [`With ${ICE_NAMES[ice.kind]}, not weighed: the wash line is without it.`];
  return [`With ${ICE_NAMES[ice.kind]}, ${formatMass(ice.massG)}.`];
}
