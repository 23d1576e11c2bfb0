import { COMPOSITION_RANGES } from '#shared/physics/composition.ts';
import { BRIX_RANGE, brixFromSugarGPerL, sugarGPerLFromBrix } from '#shared/physics/sucrose-water.ts';
import {
  SUGAR_TO_WATER_RANGE,
  brixFromRatioByMass,
  brixFromRatioByVolume,
  ratioByMassFromBrix,
  ratioByVolumeFromBrix,
  saturatedBrix,
} from '#shared/physics/syrups.ts';
import { formatGPerL, formatRatio } from '#shared/text/format-quantity.ts';
import { formatTrimmed } from '#shared/text/format-number.ts';
import { numberFromText } from './field-text.ts';
import type { SugarEntry, SugarEntryKind } from './ingredient-draft.ts';

export type SugarReading = { ok: true; sugarGPerL: number } | { ok: false; detail: string };

/** The same sugar told in one of the ways. */
export interface SugarForm {
  kind: SugarEntryKind;
  words: string;
}

export interface SugarForms {
  forms: SugarForm[];
  /** More sugar than dissolves at 20 C: physical as an oversaturated syrup, but worth a second look. */
  isAboveSaturation: boolean;
}

const ROOM_TEMPERATURE_C = 20;

/** Sugar per litre from whatever the person gave. */
export function sugarGPerLFromEntry(entry: SugarEntry): SugarReading {
  if (entry.kind === 'g/L') {
    const { min, max } = COMPOSITION_RANGES.sugarGPerL;
    const value = numberWithin(entry.gPerLText, { min, max });
    return value === null
      ? { ok: false, detail: `Sugar: a number from ${min} to ${max} g/L.` }
      : { ok: true, sugarGPerL: value };
  }
  const brix = brixFromEntry(entry);
  return brix.ok ? withinRange(roundedGPerL(sugarGPerLFromBrix(brix.value))) : brix;
}

/** The other ways to tell the same sugar; null while the entry cannot be read. */
export function sugarForms(entry: SugarEntry): SugarForms | null {
  const reading = sugarGPerLFromEntry(entry);
  if (!reading.ok) return null;
  const brix = brixFromSugarGPerL(reading.sugarGPerL);
  const all: SugarForm[] = [
    { kind: 'g/L', words: formatGPerL(reading.sugarGPerL) },
    { kind: 'Brix', words: `${formatTrimmed({ value: brix, decimals: 1 })} °Bx` },
    { kind: 'ratio by weight', words: formatRatio(ratioByMassFromBrix(brix)) },
    { kind: 'ratio by volume', words: formatRatio(ratioByVolumeFromBrix(brix)) },
  ];
  return {
    forms: all.filter((form) => form.kind !== entry.kind),
    isAboveSaturation: brix > saturatedBrix(ROOM_TEMPERATURE_C),
  };
}

function brixFromEntry(entry: SugarEntry): { ok: true; value: number } | { ok: false; detail: string } {
  if (entry.kind === 'Brix') {
    const brix = numberWithin(entry.brixText, { min: 0, max: BRIX_RANGE.max });
    return brix === null
      ? { ok: false, detail: `Degrees Brix: a number from 0 to ${BRIX_RANGE.max}.` }
      : { ok: true, value: brix };
  }
  const sugarParts = numberWithin(entry.sugarPartsText, { min: 0, max: Infinity });
  const waterParts = numberWithin(entry.waterPartsText, { min: 0, max: Infinity });
  const ratio = sugarParts === null || waterParts === null ? NaN : sugarParts / waterParts;
  if (!(ratio <= SUGAR_TO_WATER_RANGE.max)) {
    return {
      ok: false,
      detail: `Ratio: two numbers, at most ${SUGAR_TO_WATER_RANGE.max} parts of sugar to 1 of water.`,
    };
  }
  const value = entry.kind === 'ratio by weight' ? brixFromRatioByMass(ratio) : brixFromRatioByVolume(ratio);
  return { ok: true, value };
}

/** The conversion is good to 0.05 %: more digits would only look like knowledge, and come back into the field. */
function roundedGPerL(sugarGPerL: number): number {
  return Number(formatTrimmed({ value: sugarGPerL, decimals: 1 }));
}

function withinRange(sugarGPerL: number): SugarReading {
  const { max } = COMPOSITION_RANGES.sugarGPerL;
  return sugarGPerL <= max
    ? { ok: true, sugarGPerL }
    : { ok: false, detail: `Sugar: that is more than ${max} g/L.` };
}

function numberWithin(text: string, range: { min: number; max: number }): number | null {
  const value = numberFromText(text);
  return value !== null && value >= range.min && value <= range.max ? value : null;
}
