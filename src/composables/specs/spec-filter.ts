import { SPEC_SORTS, type SpecListQuery, VERSION_STATES } from '#shared/contracts/spec.ts';

/** What narrows and orders the list of specs. It stands in the address, so that going back finds it again. */
export interface SpecFilter {
  search: string;
  state: NonNullable<SpecListQuery['state']> | null;
  sort: (typeof SPEC_SORTS)[number];
  retired: NonNullable<SpecListQuery['retired']>;
}

export const NO_SPEC_FILTER: SpecFilter = { search: '', state: null, sort: '-updated', retired: 'no' };

const RETIRED = ['no', 'only', 'all'] as const;

/** Reads the filter from an address; what it does not know is left at its default. */
export function specFilterFromQuery(query: Readonly<Record<string, unknown>>): SpecFilter {
  const search = query['search'];
  return {
    search: typeof search === 'string' ? search : '',
    state: VERSION_STATES.find((word) => word === query['state']) ?? null,
    sort: SPEC_SORTS.find((word) => word === query['sort']) ?? NO_SPEC_FILTER.sort,
    retired: RETIRED.find((word) => word === query['retired']) ?? NO_SPEC_FILTER.retired,
  };
}

/** The filter as members of an address; defaults are left out. */
export function queryFromSpecFilter(filter: SpecFilter): Record<string, string> {
  return {
    ...(filter.search !== '' && { search: filter.search }),
    ...(filter.state !== null && { state: filter.state }),
    ...(filter.sort !== NO_SPEC_FILTER.sort && { sort: filter.sort }),
    ...(filter.retired !== NO_SPEC_FILTER.retired && { retired: filter.retired }),
  };
}

/** What the server is asked for. */
export function specListQuery(filter: SpecFilter, cursor: string | null): SpecListQuery {
  const search = filter.search.trim();
  return {
    sort: filter.sort,
    retired: filter.retired,
    ...(search !== '' && { search }),
    ...(filter.state !== null && { state: filter.state }),
    ...(cursor !== null && { cursor }),
  };
}

/** Whether something narrows the list, so that nothing found is told apart from no specs at all. */
export function isSpecListNarrowed(filter: SpecFilter): boolean {
  return filter.search.trim() !== '' || filter.state !== null || filter.retired === 'only';
}
