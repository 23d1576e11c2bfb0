import { describe, expect, it } from 'vitest';

import { localPath } from '#src/router/local-path.ts';

describe('the way back after signing in', () => {
  it('is a path of this site', () => {
    expect(localPath('/t/1/specs?search=x')).toBe('/t/1/specs?search=x');
  });

  it.each([
    '//elsewhere.test',
    '/\\elsewhere.test',
    'https://elsewhere.test',
    'javascript:alert(1)',
    '',
    null,
    ['/a'],
  ])('is never %j', (value) => {
    expect(localPath(value)).toBeNull();
  });
});
