import type { GlassSnapshot } from '../contracts/glass.ts';
import type { DilutionChoice, SpecBody } from '../contracts/spec.ts';
import { changeText, describeTextChange, quoted } from '../text/change-text.ts';
import { formatTrimmed } from '../text/format-number.ts';

/** Everything of a version but its lines. */
export interface DescribedMaking {
  readonly body: SpecBody;
  readonly glass: GlassSnapshot | null;
}

interface BothSides {
  readonly before: DescribedMaking;
  readonly after: DescribedMaking;
}

/** What happened to method, dilution, ice, glass, garnish, build and the size of a part. */
export function describeMakingChanges(sides: BothSides): string[] {
  const { before, after } = { before: sides.before.body, after: sides.after.body };
  const sentences = [
    describeWord({ subject: 'method', from: before.method, to: after.method }),
    describeWord({
      subject: 'dilution',
      from: dilutionText(before.dilution),
      to: dilutionText(after.dilution),
    }),
    describeWord({ subject: 'mixing ice', from: before.ice, to: after.ice }),
    ...describeGlass(sides),
    describeWord({ subject: 'ice in the glass', from: iceText(before), to: iceText(after) }),
    describeTextChange({ subject: 'garnish', from: before.garnish, to: after.garnish }),
    ...describeBuild({ from: before.build, to: after.build }),
    describePart({ before, after }),
  ];
  return sentences.filter((sentence) => sentence !== undefined);
}

function describeWord(input: {
  readonly subject: string;
  readonly from: string;
  readonly to: string;
}): string | undefined {
  const { subject, from, to } = input;
  return from === to ? undefined : `${subject} ${changeText({ from, to })}`;
}

/** Tenths of a gram, of a millilitre and of a per cent are what people enter. */
function plain(value: number): string {
  return formatTrimmed({ value, decimals: 2 });
}

function dilutionText(dilution: DilutionChoice): string {
  switch (dilution.kind) {
    case 'published':
      return 'by the published curve';
    case 'weighed':
      return `weighed (${plain(dilution.massBeforeG)} g in, ${plain(dilution.massAfterG)} g strained)`;
    case 'by hand':
      return `${plain(dilution.dilutionFraction * 100)} % by hand`;
    case 'none':
      return 'none';
  }
}

function iceText(body: SpecBody): string {
  const { kind, massG } = body.glassIce;
  return kind === 'none' || massG === 0 ? kind : `${kind} ${plain(massG)} g`;
}

function describeGlass(sides: BothSides): (string | undefined)[] {
  const { before, after } = { before: sides.before.glass, after: sides.after.glass };
  if (before === null || after === null || before.id !== after.id) {
    return [describeWord({ subject: 'glass', from: before?.name ?? 'none', to: after?.name ?? 'none' })];
  }
  return [
    describeWord({ subject: 'glass renamed', from: before.name, to: after.name }),
    isSameProfile(before, after) ? undefined : `${after.name} measured again${brimChange({ before, after })}`,
  ];
}

function isSameProfile(one: GlassSnapshot, other: GlassSnapshot): boolean {
  return (
    one.profile.length === other.profile.length &&
    one.profile.every(
      (point, index) =>
        point.heightMm === other.profile[index]?.heightMm && point.radiusMm === other.profile[index].radiusMm,
    )
  );
}

function brimChange(input: { readonly before: GlassSnapshot; readonly after: GlassSnapshot }): string {
  const [from = '', to = ''] = [input.before, input.after].map(({ brimMl }) =>
    formatTrimmed({ value: brimMl, decimals: 0 }),
  );
  return from === to ? '' : `: brim ${changeText({ from, to, fromUnit: 'ml', toUnit: 'ml' })}`;
}

/** The size of a part matters only to lines that are written in parts. */
function describePart(input: { readonly before: SpecBody; readonly after: SpecBody }): string | undefined {
  const { before, after } = input;
  const usesParts = [...before.lines, ...after.lines].some((line) => line.amount.unit === 'part');
  if (!usesParts) return undefined;
  return describeWord({
    subject: 'one part',
    from: `${plain(before.partMl)} ml`,
    to: `${plain(after.partMl)} ml`,
  });
}

function describeBuild(input: {
  readonly from: readonly string[];
  readonly to: readonly string[];
}): string[] {
  const { from, to } = input;
  const start = sharedStart(from, to);
  const end = sharedStart([...from.slice(start)].reverse(), [...to.slice(start)].reverse());
  const left = from.slice(start, from.length - end);
  const right = to.slice(start, to.length - end);
  if (left.length > 0 && [...left].sort().join('\n') === [...right].sort().join('\n')) {
    return ['build: same steps in another order'];
  }
  const steps = Array.from({ length: Math.max(left.length, right.length) }, (_, index) =>
    describeStep({ number: start + index + 1, from: left[index], to: right[index] }),
  );
  return steps.filter((step) => step !== undefined);
}

function sharedStart(one: readonly string[], other: readonly string[]): number {
  const differs = one.findIndex((step, index) => step !== other[index]);
  return differs < 0 ? one.length : differs;
}

function describeStep(input: {
  readonly number: number;
  readonly from: string | undefined;
  readonly to: string | undefined;
}): string | undefined {
  const { number, from, to } = input;
  if (from === to) return undefined;
  if (from === undefined) return `build step ${number} added: ${quoted(to ?? '')}`;
  if (to === undefined) return `build step ${number} removed: ${quoted(from)}`;
  return `build step ${number} ${changeText({ from: quoted(from), to: quoted(to) })}`;
}
