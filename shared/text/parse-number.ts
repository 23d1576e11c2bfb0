export type ParsedNumber =
  | { readonly ok: true; readonly value: number }
  | {
      readonly ok: false;
      readonly reason: 'empty' | 'unreadable' | 'ambiguous' | 'below' | 'above';
      readonly detail: string;
    };

export function parseNumber(
  _text: string,
  _limits: { readonly min?: number; readonly max?: number } = {},
): ParsedNumber {
  throw new Error('being written');
}
