import { describe, expect, it } from 'vitest';

import { formatMoney } from '#shared/text/format-money.ts';
import {
  decimalsOf,
  formatAbv,
  formatDensity,
  formatDilution,
  formatEnergy,
  formatGPerL,
  formatLength,
  formatMass,
  formatRatio,
  formatStandardDrinks,
  formatTemperature,
  formatVolume,
} from '#shared/text/format-quantity.ts';

/** With ordinary spaces, so that the expectation can be read; one test below looks at the real one. */
function plain(text: string): string {
  return text.replaceAll('\u00a0', ' ');
}

describe('quantities with the digits their spread supports', () => {
  it.each([
    [7.54, '7.5 ml'],
    [22.5, '22.5 ml'],
    [99.94, '99.9 ml'],
    [99.97, '100 ml'],
    [118.3, '118 ml'],
    [-12.34, '\u221212.3 ml'],
  ])('%d mL is %j', (volumeMl, text) => {
    expect(plain(formatVolume({ volumeMl, unit: 'ml' }))).toBe(text);
  });

  it.each([
    // ÷ 29.5735295625 mL, NIST Handbook 44, Appendix C
    [118, '3.99 oz'],
    [22.5, '0.76 oz'],
    [354.88, '12.0 oz'],
  ])('%d mL is %j in ounces', (volumeMl, text) => {
    expect(plain(formatVolume({ volumeMl, unit: 'oz' }))).toBe(text);
  });

  it.each([
    [0.853, '0.85 g'],
    [9.996, '10.0 g'],
    [13.84, '13.8 g'],
    [166.6, '167 g'],
  ])('%d g is %j', (massG, text) => {
    expect(plain(formatMass(massG))).toBe(text);
  });

  it('gives strength and dilution in per cent', () => {
    expect(plain(formatAbv(0.1824))).toBe('18.2 %');
    expect(plain(formatDilution(0.5193))).toBe('51.9 %');
  });

  it('gives concentrations, ratio, energy, length, density and standard drinks', () => {
    expect(plain(formatGPerL(8.44))).toBe('8.4 g/L');
    expect(plain(formatGPerL(615.2))).toBe('615 g/L');
    expect(plain(formatRatio(7.92))).toBe('7.9 : 1');
    expect(plain(formatRatio(123.4))).toBe('123 : 1');
    expect(formatRatio(null)).toBe('\u2013');
    expect(plain(formatEnergy(187.4))).toBe('187 kcal');
    expect(plain(formatLength(61.6))).toBe('62 mm');
    expect(plain(formatDensity(1.03849))).toBe('1.0385 g/ml');
    expect(formatStandardDrinks(1.86)).toBe('1.9');
  });

  it.each([
    // Fixed points of the scales: water freezes at 32 °F and boils at 212 °F; both scales meet at −40.
    [0, '0.0 °C', '32.0 °F'],
    [100, '100.0 °C', '212.0 °F'],
    [-40, '\u221240.0 °C', '\u221240.0 °F'],
    [-5.2, '\u22125.2 °C', '22.6 °F'],
  ])('%d °C reads %j and %j', (temperatureC, celsius, fahrenheit) => {
    expect(plain(formatTemperature({ temperatureC, unit: 'C' }))).toBe(celsius);
    expect(plain(formatTemperature({ temperatureC, unit: 'F' }))).toBe(fahrenheit);
  });

  it('keeps number and unit on one line', () => {
    expect(formatVolume({ volumeMl: 118, unit: 'ml' })).toBe('118\u00a0ml');
  });

  it('shows a value that rounds up to the next size like that size', () => {
    expect(decimalsOf({ quantity: 'volumeMl', value: 99.949 })).toBe(1);
    expect(decimalsOf({ quantity: 'volumeMl', value: 99.951 })).toBe(0);
    expect(decimalsOf({ quantity: 'volumeMl', value: -100 })).toBe(0);
  });
});

describe('money', () => {
  it.each([
    // ISO 4217: minor units of GBP and EUR are 2, of JPY 0, of KWD 3
    ['12.5', 'GBP', '12.50 GBP'],
    ['12', 'EUR', '12.00 EUR'],
    ['12.50', 'EUR', '12.50 EUR'],
    ['0.0235', 'EUR', '0.0235 EUR'],
    ['0.0200', 'EUR', '0.02 EUR'],
    ['1200', 'JPY', '1200 JPY'],
    ['1.5', 'KWD', '1.500 KWD'],
    ['123456789.1234', 'GBP', '123456789.1234 GBP'],
  ])('%s %s is %j', (amount, currency, text) => {
    expect(plain(formatMoney({ amount, currency }))).toBe(text);
  });
});
