/** Whether PostgreSQL takes the text as a UUID; anything else in its place is an error there, not an empty answer. */
export function isUuid(text: string): boolean {
  return /^[0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12}$/i.test(text);
}
