/**
 * Common glasses with an inside profile, to start a team's list from.
 *
 * No standard fixes these shapes: they are plausible house measurements, from memory, each with the brim volume that follows from its
 * profile. A team that measures its own glasses replaces them. Source id: house-glasses (docs/sources/glass.md).
 */
import type { Profile } from '../glass.ts';

export interface CommonGlass {
  readonly key: string;
  readonly name: string;
  /** Foot and stem below the bowl, drawn only [mm]. */
  readonly stemMm: number;
  /** Volume to the brim that the profile gives, to the whole mL. */
  readonly brimMl: number;
  /** Inside profile from the bottom to the brim. */
  readonly profile: Profile;
}

function glass(input: {
  key: string;
  name: string;
  stemMm: number;
  brimMl: number;
  points: readonly (readonly [heightMm: number, radiusMm: number])[];
}): CommonGlass {
  const { key, name, stemMm, brimMl, points } = input;
  return {
    key,
    name,
    stemMm,
    brimMl,
    profile: points.map(([heightMm, radiusMm]) => ({ heightMm, radiusMm })),
  };
}

/** Heights and inside radii [mm]. */
export const COMMON_GLASSES: readonly CommonGlass[] = [
  glass({
    key: 'coupe',
    name: 'Coupe',
    stemMm: 75,
    brimMl: 241,
    points: [
      [0, 0],
      [3, 16],
      [8, 28],
      [15, 37],
      [25, 44],
      [38, 47.5],
      [48, 48],
    ],
  }),
  glass({
    key: 'small-coupe',
    name: 'Small coupe',
    stemMm: 80,
    brimMl: 169,
    points: [
      [0, 0],
      [3, 14],
      [8, 24],
      [15, 32],
      [24, 38],
      [35, 41.5],
      [45, 42.5],
    ],
  }),
  glass({
    key: 'bell',
    name: 'Bell',
    stemMm: 85,
    brimMl: 182,
    points: [
      [0, 0],
      [3, 10],
      [8, 18],
      [16, 24],
      [28, 29],
      [42, 32],
      [58, 34],
      [70, 35],
    ],
  }),
  glass({
    key: 'cocktail-cone',
    name: 'Cocktail cone',
    stemMm: 85,
    brimMl: 198,
    points: [
      [0, 0],
      [4, 4],
      [62, 55],
    ],
  }),
  glass({
    key: 'rocks',
    name: 'Rocks',
    stemMm: 0,
    brimMl: 306,
    points: [
      [0, 33],
      [2, 36],
      [30, 37.5],
      [68, 40],
    ],
  }),
  glass({
    key: 'double-rocks',
    name: 'Double rocks',
    stemMm: 0,
    brimMl: 422,
    points: [
      [0, 36],
      [2, 39],
      [40, 41],
      [80, 43],
    ],
  }),
  glass({
    key: 'highball',
    name: 'Highball',
    stemMm: 0,
    brimMl: 317,
    points: [
      [0, 25],
      [2, 27.5],
      [60, 29],
      [120, 30.5],
    ],
  }),
  glass({
    key: 'collins',
    name: 'Collins',
    stemMm: 0,
    brimMl: 372,
    points: [
      [0, 25],
      [2, 27],
      [75, 28.5],
      [146, 30],
    ],
  }),
  glass({
    key: 'flute',
    name: 'Flute',
    stemMm: 90,
    brimMl: 211,
    points: [
      [0, 0],
      [5, 5],
      [15, 12],
      [35, 19],
      [70, 25],
      [110, 26],
      [140, 23.5],
    ],
  }),
  glass({
    key: 'wine',
    name: 'Wine',
    stemMm: 90,
    brimMl: 386,
    points: [
      [0, 0],
      [3, 16],
      [10, 27],
      [22, 36],
      [38, 41],
      [55, 41],
      [75, 37.5],
      [95, 32],
    ],
  }),
  glass({
    key: 'copa',
    name: 'Balloon',
    stemMm: 90,
    brimMl: 720,
    points: [
      [0, 0],
      [4, 24],
      [12, 38],
      [25, 49],
      [42, 55],
      [58, 55.5],
      [78, 51],
      [98, 43],
    ],
  }),
  glass({
    key: 'julep-tin',
    name: 'Julep tin',
    stemMm: 0,
    brimMl: 371,
    points: [
      [0, 27],
      [2, 29],
      [45, 35],
      [95, 41],
    ],
  }),
  glass({
    key: 'shot',
    name: 'Shot',
    stemMm: 0,
    brimMl: 52,
    points: [
      [0, 15],
      [2, 17],
      [45, 21.5],
    ],
  }),
  glass({
    key: 'toddy',
    name: 'Toddy',
    stemMm: 15,
    brimMl: 309,
    points: [
      [0, 25],
      [3, 29],
      [40, 33],
      [90, 36.5],
    ],
  }),
  glass({
    key: 'sour',
    name: 'Stemmed sour',
    stemMm: 60,
    brimMl: 156,
    points: [
      [0, 0],
      [4, 10],
      [12, 18],
      [30, 24],
      [60, 27.5],
      [85, 29],
    ],
  }),
];
