/** A path of this site to go back to; anything that could lead elsewhere is ignored. */
export function localPath(value: unknown): string | null {
  return typeof value === 'string' && /^\/(?![/\\])/.test(value) ? value : null;
}
