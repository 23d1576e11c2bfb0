import { acidAsCitric, apparentVolumeOfAcidsMl, totalAcid } from '#shared/physics/acids.ts';
import type { DraftBody, SpecBody } from '#shared/contracts/spec.ts';
import type { Composition } from '#shared/physics/composition.ts';
import { contentsPerMl } from '#shared/physics/contents.ts';
import { finishedDrink } from '#shared/physics/finished-drink.ts';
import { evaluateSpec } from '#shared/specs/evaluate-spec.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';
import {
  aDraft,
  aDraftLine,
  aGlassSnapshot,
  aLine,
  aSpecBody,
  anId,
  anIngredientSnapshot,
  byId,
} from '#tests/support/builders.ts';
import { type Bench, type BenchModule, type Measurement, type Row, measureInTurn } from './harness.ts';
import { type PlainLine, plainFigures } from './inlined-figures.ts';

/** Figures of a six-line spec must come at least this often in one thread. */
const WANTED_PER_SECOND = 20_000;

function liquid(stated: Partial<Composition>): Composition {
  return { abvFraction: 0, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null, ...stated };
}

/** Two spirits, a liqueur, a juice whose density was measured, a syrup and bitters. */
const LINES: readonly { readonly volumeMl: number; readonly composition: Composition }[] = [
  { volumeMl: 45, composition: liquid({ abvFraction: 0.4 }) },
  { volumeMl: 15, composition: liquid({ abvFraction: 0.45 }) },
  { volumeMl: 10, composition: liquid({ abvFraction: 0.4, sugarGPerL: 240 }) },
  {
    volumeMl: 22.5,
    composition: liquid({ sugarGPerL: 17, acidsGPerL: { citric: 45, malic: 4 }, densityGPerMl: 1.03 }),
  },
  { volumeMl: 15, composition: liquid({ sugarGPerL: 615 }) },
  { volumeMl: 0.8, composition: liquid({ abvFraction: 0.45, sugarGPerL: 40 }) },
];

const READY = LINES.map(({ composition, volumeMl }) => ({
  contentsPerMl: contentsPerMl(composition),
  volumeMl,
}));

const PLAIN: readonly PlainLine[] = READY.map(({ contentsPerMl: contents, volumeMl }) => ({
  volumeMl,
  ethanolG: contents.ethanolG,
  waterG: contents.waterG,
  sugarG: contents.sugarG,
  acidG: totalAcid(contents.acidsG),
  acidMl: apparentVolumeOfAcidsMl(contents.acidsG),
  acidCitricG: acidAsCitric(contents.acidsG),
  restG: contents.restG,
}));

/** The first volume moves a little every time, as when somebody types. */
function moved<Line extends { readonly volumeMl: number }>(lines: readonly Line[], step: number): Line[] {
  return lines.map((line, index) => (index === 0 ? { ...line, volumeMl: 45 + (step % 100) / 10 } : line));
}

function figures(portions: Parameters<typeof finishedDrink>[0]['mixPortions']) {
  return finishedDrink({
    mixPortions: portions,
    topPortions: [],
    dilution: { kind: 'published' },
    method: 'shake',
  });
}

const SNAPSHOTS = LINES.map(({ composition }, index) =>
  anIngredientSnapshot({ id: anId(100 + index), composition }),
);
const INGREDIENTS = byId(SNAPSHOTS);
const GLASS = aGlassSnapshot();

/** The amount of the first line, in tenths so that it stays a number that somebody would write. */
const firstMl = (step: number): number => 45 + (step % 100) / 10;

function evaluated(body: SpecBody | DraftBody): number {
  const inputs = { body, ingredients: INGREDIENTS, glass: GLASS, houseMeasures: DEFAULT_HOUSE_MEASURES };
  return evaluateSpec(inputs).figures!.finalMl;
}

/** All figures of a spec: amounts in their units, liquids from labels, allergens, wash line. */
const fromSpec: Bench = {
  name: 'evaluateSpec of a six-line spec (nothing cached)',
  run: (count) => {
    let sum = 0;
    for (let step = 0; step < count; step += 1) {
      const lines = LINES.map(({ volumeMl }, index) =>
        aLine({
          id: anId(index + 1),
          ingredientId: SNAPSHOTS[index]!.id,
          amount: { value: index === 0 ? firstMl(step) : volumeMl, unit: 'ml' },
        }),
      );
      sum += evaluated(aSpecBody({ lines }));
    }
    return sum;
  },
};

/** What a keystroke costs: the same, with every amount read from text. */
const fromDraft: Bench = {
  name: 'evaluateSpec of a six-line draft, amounts as typed',
  run: (count) => {
    let sum = 0;
    for (let step = 0; step < count; step += 1) {
      const lines = LINES.map(({ volumeMl }, index) =>
        aDraftLine({
          id: anId(index + 1),
          ingredientId: SNAPSHOTS[index]!.id,
          amountText: `${index === 0 ? firstMl(step) : volumeMl} ml`,
        }),
      );
      sum += evaluated(aDraft({ lines }));
    }
    return sum;
  },
};

const fromLabels: Bench = {
  name: 'physics of six lines, from labels (nothing cached)',
  run: (count) => {
    let sum = 0;
    for (let step = 0; step < count; step += 1) {
      const portions = moved(LINES, step).map(({ composition, volumeMl }) => ({
        contentsPerMl: contentsPerMl(composition),
        volumeMl,
      }));
      sum += figures(portions).finalMl;
    }
    return sum;
  },
};

const fromContents: Bench = {
  name: 'physics of six lines, contents of each liquid ready',
  run: (count) => {
    let sum = 0;
    for (let step = 0; step < count; step += 1) sum += figures(moved(READY, step)).finalMl;
    return sum;
  },
};

const inlined: Bench = {
  name: 'the same physics in plain arithmetic by hand',
  run: (count) => {
    let sum = 0;
    for (let step = 0; step < count; step += 1) sum += plainFigures(moved(PLAIN, step)).finalMl;
    return sum;
  },
};

/** The hand-written arithmetic is only worth comparing with while it gives the same. */
function disagreement(): number {
  const [real, plain] = [figures(READY), plainFigures(PLAIN)];
  const keys = [
    'undilutedMl',
    'finalMl',
    'finalMassG',
    'abvFraction',
    'sugarGPerL',
    'acidCitricGPerL',
    'energyKcal',
  ] as const;
  return Math.max(...keys.map((key) => Math.abs(plain[key] / real[key] - 1)));
}

const AGREEMENT = 1e-6;

function rowOf(measured: Measurement, remark: string): Row {
  const perSecond = Math.round(measured.perSecond).toLocaleString('en');
  return {
    name: measured.name,
    value: `${perSecond} /s`,
    remark: `${measured.microsecondsEach.toFixed(2)} µs each${remark}`,
  };
}

function measure(): Row[] {
  const benches = [fromSpec, fromDraft, fromLabels, fromContents, inlined];
  const [spec, draft, labels, contents, plain] = measureInTurn(benches);
  const isFastEnough = spec!.perSecond >= WANTED_PER_SECOND;
  const difference = disagreement();
  return [
    rowOf(spec!, ''),
    rowOf(draft!, ''),
    rowOf(labels!, ''),
    rowOf(contents!, ''),
    rowOf(plain!, ''),
    {
      name: 'time with contents ready ÷ time of plain arithmetic',
      value: `${(plain!.perSecond / contents!.perSecond).toFixed(2)} x`,
      remark: 'plain arithmetic checks nothing, warns of nothing, and has no freezing point',
    },
    {
      name: 'evaluateSpec of a spec, at least 20,000 /s',
      value: isFastEnough ? 'met' : 'not met',
      remark: isFastEnough
        ? `${(spec!.perSecond / WANTED_PER_SECOND).toFixed(1)} times as fast`
        : 'FAILED: too slow',
    },
    {
      name: 'plain arithmetic gives the same figures',
      value: difference.toExponential(1),
      remark: difference <= AGREEMENT ? 'largest relative difference' : 'FAILED: largest relative difference',
    },
  ];
}

export const figuresBench: BenchModule = { title: 'Figures of a spec, one thread, processor time', measure };
