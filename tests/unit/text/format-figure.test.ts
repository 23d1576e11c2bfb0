import { describe, expect, it } from 'vitest';

import {
  METRIC_UNITS,
  type ShownUnits,
  figureParts,
  formatFigure,
  formatFigureDifference,
  shownStep,
} from '#shared/text/format-figure.ts';

const US_UNITS: ShownUnits = { volumeUnit: 'oz', temperatureUnit: 'F' };

function plain(text: string): string {
  return text.replaceAll('\u00a0', ' ');
}

describe('a compared figure', () => {
  it.each([
    ['finalMl', 118.3, '118 ml', '4.00 oz'],
    ['abvFraction', 0.1824, '18.2 %', '18.2 %'],
    ['acidCitricGPerL', 8.44, '8.4 g/L', '8.4 g/L'],
    ['sugarAcidRatio', 7.92, '7.9 : 1', '7.9 : 1'],
    ['freezingPointC', -5, '\u22125.0 °C', '23.0 °F'],
    ['washLineMm', 61.6, '62 mm', '62 mm'],
    ['headroomMl', -4.2, '\u22124.2 ml', '\u22120.14 oz'],
  ] as const)('%s of %d is %j, or %j', (figure, value, metric, us) => {
    expect(plain(formatFigure({ figure, value, ...METRIC_UNITS }))).toBe(metric);
    expect(plain(formatFigure({ figure, value, ...US_UNITS }))).toBe(us);
  });

  it('is a dash where there is none, never a nought', () => {
    expect(formatFigure({ figure: 'washLineMm', value: null, ...METRIC_UNITS })).toBe('\u2013');
  });

  it('comes apart into number and unit', () => {
    expect(figureParts({ figure: 'abvFraction', value: 0.2, ...METRIC_UNITS })).toEqual({
      number: '20.0',
      unit: '%',
    });
  });
});

describe('a difference between figures', () => {
  it.each([
    ['abvFraction', 0.17, -0.012, 'down', '\u22121.2 points'],
    ['acidCitricGPerL', 8.4, 0.8, 'up', '+0.8 g/L'],
    ['finalMl', 130, 12, 'up', '+12 ml'],
    ['sugarAcidRatio', 8, 0.5, 'up', '+0.5'],
  ] as const)(
    '%s of %d, moved by %d, is shown with its sign',
    (figure, value, difference, direction, text) => {
      expect(
        plain(formatFigureDifference({ figure, cell: { value, difference, direction }, ...METRIC_UNITS })),
      ).toBe(text);
    },
  );

  it('of temperatures has no offset: 5 °C warmer is 9 °F warmer', () => {
    const cell = { value: 0, difference: 5, direction: 'up' } as const;
    expect(plain(formatFigureDifference({ figure: 'freezingPointC', cell, ...US_UNITS }))).toBe('+9.0 °F');
  });

  it('too small to be shown is the same; unknown is a dash', () => {
    const same = { value: 118, difference: 0.2, direction: 'same' } as const;
    const unknown = { value: null, difference: null, direction: 'unknown' } as const;
    expect(formatFigureDifference({ figure: 'finalMl', cell: same, ...METRIC_UNITS })).toBe('same');
    expect(formatFigureDifference({ figure: 'finalMl', cell: unknown, ...METRIC_UNITS })).toBe('\u2013');
  });
});

describe('the smallest difference that shows', () => {
  it.each([
    ['finalMl', 118, 1],
    ['finalMl', 98, 0.1],
    ['abvFraction', 0.18, 0.001],
    ['acidCitricGPerL', 8.4, 0.1],
  ] as const)('of %s at %d is %d', (figure, value, step) => {
    expect(shownStep({ figure, value })).toBeCloseTo(step, 12);
  });
});
