import type { DraftBody, LineStage } from '#shared/contracts/spec.ts';
import type { NoteWrite } from '#shared/contracts/version.ts';

import type { DemoPersonKey } from './people.ts';

/** A line as the demo writes it: amount, ingredient by name, and whether it is added after mixing. */
export type DemoLine = readonly [amountText: string, ingredient: string, stage?: LineStage];

export interface DemoVersion {
  why: string;
  lines: readonly DemoLine[];
  notes?: readonly { by: DemoPersonKey; note: NoteWrite }[];
  state?: 'on trial' | 'locked';
}

export interface DemoServe {
  name: string;
  description: string;
  glass: string;
  making: Pick<DraftBody, 'method' | 'dilution' | 'ice' | 'glassIce' | 'garnish' | 'build'>;
  versions: readonly DemoVersion[];
  variant?: { name: string; version: DemoVersion };
}

type Scores = readonly [number, number, number, number, number, number];

function note([sweet, sour, bitter, strength, texture, overall]: Scores, words: string): NoteWrite {
  return { scores: { sweet, sour, bitter, strength, texture, overall }, words };
}

/** The serves of the Gannet Room: one shaken sour, one stirred, one long, one low in alcohol. Invented. */
export const DEMO_SERVES: readonly DemoServe[] = [
  {
    name: 'Harbour Light',
    description: 'The shaken sour of the list: no fresh citrus at service, husk cordial instead.',
    glass: 'Coupe',
    making: {
      method: 'shake',
      dilution: { kind: 'published' },
      ice: 'cubes',
      glassIce: { kind: 'none', massG: 0 },
      garnish: 'Grapefruit zest, expressed and discarded',
      build: [
        'Measure everything into the small tin.',
        'Shake hard on cubes for 12 seconds.',
        'Strain twice into a cold coupe.',
      ],
    },
    versions: [
      {
        why: 'Where we start: the classic build with fresh lime',
        lines: [
          ['60 ml', 'White rum'],
          ['22.5 ml', 'Lime juice, fresh'],
          ['22.5 ml', 'Simple syrup 1:1 by mass'],
        ],
        notes: [
          { by: 'trainer', note: note([6, 7, 1, 6, 5, 7], 'Clean and familiar. This is the mark to hit.') },
        ],
      },
      {
        why: 'Husk cordial in place of lime and syrup',
        lines: [
          ['60 ml', 'White rum'],
          ['35 ml', 'Grapefruit husk cordial'],
        ],
        notes: [
          {
            by: 'bartender',
            note: note([8, 5, 3, 6, 6, 6], 'Lovely peel, but it sits sweet by the end of the glass.'),
          },
          { by: 'trainer', note: note([7, 5, 3, 6, 6, 6], 'Needs a brighter finish.') },
        ],
      },
      {
        why: 'A little lime back for the finish, cordial down',
        lines: [
          ['55 ml', 'White rum'],
          ['30 ml', 'Grapefruit husk cordial'],
          ['10 ml', 'Lime juice, fresh'],
          ['2 drops', 'Citrus-leaf saline'],
        ],
        notes: [
          {
            by: 'menuWriter',
            note: note([6, 6, 3, 6, 7, 8], 'Grapefruit first, then salt and lime. Easy to describe.'),
          },
        ],
        state: 'locked',
      },
    ],
    variant: {
      name: 'pineapple',
      version: {
        why: 'The same frame with pineapple core syrup for the summer list',
        lines: [
          ['55 ml', 'White rum'],
          ['20 ml', 'Pineapple core syrup'],
          ['20 ml', 'Lime juice, fresh'],
        ],
        state: 'on trial',
      },
    },
  },
  {
    name: 'Slack Water',
    description: 'Stirred, spirit-led, for after dinner. Uses the coffee grounds and the bread crusts.',
    glass: 'Small coupe',
    making: {
      method: 'stir',
      dilution: { kind: 'published' },
      ice: 'large cubes',
      glassIce: { kind: 'none', massG: 0 },
      garnish: 'None',
      build: ['Stir on large cubes until the glass frosts.', 'Strain into a frozen glass.'],
    },
    versions: [
      {
        why: 'First idea: rum and sweet vermouth, two to one',
        lines: [
          ['50 ml', 'Aged rum'],
          ['25 ml', 'Sweet red vermouth'],
          ['2 dashes', 'Aromatic bitters'],
        ],
      },
      {
        why: 'Coffee and crust preps, amaro for length',
        lines: [
          ['45 ml', 'Spent-coffee rum'],
          ['22.5 ml', 'Bread-crust vermouth'],
          ['10 ml', 'Amaro, medium'],
          ['2 dashes', 'Aromatic bitters'],
        ],
        notes: [
          {
            by: 'bartender',
            note: note([5, 2, 6, 7, 7, 8], 'Toast and coffee, no heat. Holds well for ten minutes.'),
          },
        ],
        state: 'on trial',
      },
    ],
  },
  {
    name: 'Long Ebb',
    description: 'The long drink: rhubarb shrub and soda.',
    glass: 'Highball',
    making: {
      method: 'build',
      dilution: { kind: 'by hand', dilutionFraction: 0.15 },
      ice: 'cubes',
      glassIce: { kind: 'cubes', massG: 140 },
      garnish: 'Rhubarb ribbon',
      build: ['Build over fresh cubes.', 'Top with cold soda and lift once.'],
    },
    versions: [
      {
        why: 'Shrub, gin and soda',
        lines: [
          ['40 ml', 'Gin (London-dry type)'],
          ['25 ml', 'Rhubarb trim shrub'],
          ['90 ml', 'Soda water', 'top'],
        ],
        notes: [
          {
            by: 'trainer',
            note: note([4, 6, 1, 4, 5, 6], 'Vinegar shows at the start. Softer with a little pineapple?'),
          },
        ],
      },
      {
        why: 'Pineapple core syrup to round the vinegar, less shrub',
        lines: [
          ['40 ml', 'Gin (London-dry type)'],
          ['20 ml', 'Rhubarb trim shrub'],
          ['10 ml', 'Pineapple core syrup'],
          ['90 ml', 'Soda water', 'top'],
        ],
        notes: [
          { by: 'bartender', note: note([6, 5, 1, 4, 6, 6], 'Rounder, but the rhubarb has gone quiet.') },
          { by: 'manager', note: note([6, 5, 1, 4, 6, 7], 'I would order a second one.') },
        ],
      },
      {
        why: 'Rhubarb forward again: shrub up, pineapple down, a little salt',
        lines: [
          ['40 ml', 'Gin (London-dry type)'],
          ['25 ml', 'Rhubarb trim shrub'],
          ['5 ml', 'Pineapple core syrup'],
          ['2 drops', 'Citrus-leaf saline'],
          ['90 ml', 'Soda water', 'top'],
        ],
        notes: [
          {
            by: 'trainer',
            note: note([5, 6, 1, 4, 6, 8], 'Salt makes the fruit. Easy to teach: one jigger, one top.'),
          },
        ],
        state: 'on trial',
      },
    ],
  },
  {
    name: 'Small Hours',
    description: 'Low in alcohol, at equal standing on the list.',
    glass: 'Wine',
    making: {
      method: 'build',
      dilution: { kind: 'published' },
      ice: 'cubes',
      glassIce: { kind: 'cubes', massG: 120 },
      garnish: 'Lemon leaf',
      build: ['Build on cubes in the glass.', 'Top with tonic.'],
    },
    versions: [
      {
        why: 'Dry vermouth carried by whey cordial and tonic',
        lines: [
          ['45 ml', 'Dry vermouth'],
          ['20 ml', 'Whey and lemon-peel cordial'],
          ['70 ml', 'Tonic water', 'top'],
        ],
        notes: [
          {
            by: 'menuWriter',
            note: note([8, 4, 4, 2, 6, 6], 'Pretty, but the tonic brings sugar of its own.'),
          },
        ],
      },
      {
        why: 'Less cordial and a little lemon, since tonic is sweet already',
        lines: [
          ['45 ml', 'Dry vermouth'],
          ['15 ml', 'Whey and lemon-peel cordial'],
          ['7.5 ml', 'Lemon juice, fresh'],
          ['70 ml', 'Tonic water', 'top'],
        ],
        notes: [
          { by: 'trainer', note: note([6, 6, 4, 2, 6, 8], 'Grown up. Nobody asked where the spirit was.') },
          { by: 'bartender', note: note([6, 6, 4, 2, 6, 7], 'Say “milk” at the table: the whey is in it.') },
        ],
        state: 'on trial',
      },
    ],
  },
];

/** What the kiosk at the ferry stage is working on, all from the shelf. */
export const KIOSK_SERVES: readonly DemoServe[] = [
  {
    name: 'Last Boat',
    description: 'One for the queue: two pours and a top.',
    glass: 'Highball',
    making: {
      method: 'build',
      dilution: { kind: 'by hand', dilutionFraction: 0.15 },
      ice: 'cubes',
      glassIce: { kind: 'cubes', massG: 140 },
      garnish: 'Lime wedge',
      build: ['Build over fresh cubes.', 'Top with ginger beer.'],
    },
    versions: [
      {
        why: 'Aged rum, lime and ginger beer, as everybody knows it',
        lines: [
          ['45 ml', 'Aged rum'],
          ['15 ml', 'Lime juice, fresh'],
          ['100 ml', 'Ginger beer, soft', 'top'],
        ],
      },
      {
        why: 'Less lime, since the queue is cold and wants it round',
        lines: [
          ['45 ml', 'Aged rum'],
          ['10 ml', 'Lime juice, fresh'],
          ['100 ml', 'Ginger beer, soft', 'top'],
        ],
        notes: [{ by: 'developer', note: note([6, 5, 1, 5, 5, 7], 'Quick to pour and easy to like.') }],
      },
    ],
  },
];
