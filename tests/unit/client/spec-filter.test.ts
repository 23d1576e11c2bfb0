import { describe, expect, it } from 'vitest';

import {
  NO_SPEC_FILTER,
  isSpecListNarrowed,
  queryFromSpecFilter,
  specFilterFromQuery,
  specListQuery,
} from '#src/composables/specs/spec-filter.ts';

describe('the filter of the spec list', () => {
  it('comes back from the address as it was put there', () => {
    const filter = { search: 'husk & lime', state: 'on trial', sort: '-abv', retired: 'all' } as const;
    expect(specFilterFromQuery(queryFromSpecFilter(filter))).toEqual(filter);
  });

  it('adds nothing to the address while nothing is filtered', () => {
    expect(queryFromSpecFilter(NO_SPEC_FILTER)).toEqual({});
  });

  it('takes an address that says nonsense as no filter', () => {
    const query = { search: ['a', 'b'], state: 'poured', sort: 'password', retired: '' };
    expect(specFilterFromQuery(query)).toEqual(NO_SPEC_FILTER);
  });

  it('asks the server only for what is chosen, and for the next page where there is one', () => {
    expect(specListQuery({ ...NO_SPEC_FILTER, search: '  sour ' }, 'c1')).toEqual({
      search: 'sour',
      sort: '-updated',
      retired: 'no',
      cursor: 'c1',
    });
  });

  it('narrows by search, state or retired ones alone, and not by order or by showing more', () => {
    expect(isSpecListNarrowed({ ...NO_SPEC_FILTER, sort: 'name', retired: 'all' })).toBe(false);
    expect(isSpecListNarrowed({ ...NO_SPEC_FILTER, search: '  ' })).toBe(false);
    expect(isSpecListNarrowed({ ...NO_SPEC_FILTER, search: 'x' })).toBe(true);
    expect(isSpecListNarrowed({ ...NO_SPEC_FILTER, state: 'locked' })).toBe(true);
    expect(isSpecListNarrowed({ ...NO_SPEC_FILTER, retired: 'only' })).toBe(true);
  });
});
