/** JSON with the members of every object sorted, so that equal values give equal text wherever they come from. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, member: unknown) => {
    if (typeof member !== 'object' || member === null || Array.isArray(member)) return member;
    return Object.fromEntries(Object.entries(member).sort(([a], [b]) => (a < b ? -1 : 1)));
  });
}
