/** Ids of new lines. `crypto.randomUUID` is missing on plain http, where a bar may well run this. */

const VERSION_4 = 0x40;
const VARIANT_1 = 0x80;

/** A random UUID, version 4 (RFC 9562). */
export function newId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  bytes[6] = ((bytes[6] ?? 0) & 0x0f) | VERSION_4;
  bytes[8] = ((bytes[8] ?? 0) & 0x3f) | VARIANT_1;
  const hex = [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
  return [8, 12, 16, 20].reduceRight((text, at) => `${text.slice(0, at)}-${text.slice(at)}`, hex);
}
