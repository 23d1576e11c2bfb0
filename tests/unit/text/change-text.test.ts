import { describe, expect, it } from 'vitest';

import { changeText, describeTextChange, quoted } from '#shared/text/change-text.ts';

describe('a change in words', () => {
  it('names the unit once when it stays and twice when it does not', () => {
    expect(changeText({ from: '22.5', to: '20', fromUnit: 'ml', toUnit: 'ml' })).toBe('22.5 → 20 ml');
    expect(changeText({ from: '2', to: '1', fromUnit: 'dashes', toUnit: 'ml' })).toBe('2 dashes → 1 ml');
    expect(changeText({ from: 'shake', to: 'stir' })).toBe('shake → stir');
  });

  it('tells a text that was added, removed, changed or left alone', () => {
    expect(describeTextChange({ subject: 'garnish', from: '', to: 'mint' })).toBe('garnish added: “mint”');
    expect(describeTextChange({ subject: 'garnish', from: 'mint', to: ' ' })).toBe('garnish removed: “mint”');
    expect(describeTextChange({ subject: 'garnish', from: 'mint', to: 'lime' })).toBe(
      'garnish “mint” → “lime”',
    );
    expect(describeTextChange({ subject: 'garnish', from: 'mint ', to: 'mint' })).toBeUndefined();
  });

  it('quotes long words on one line, cut at 80 characters', () => {
    expect(quoted('shake\n  hard')).toBe('“shake hard”');
    expect(quoted('x'.repeat(80))).toBe(`“${'x'.repeat(80)}”`);
    expect(quoted('x'.repeat(81))).toBe(`“${'x'.repeat(79)}…”`);
  });
});
