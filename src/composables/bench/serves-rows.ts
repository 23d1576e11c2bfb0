/** The lines for a number of serves, to be read or printed. */
import type { DraftBody } from '#shared/contracts/spec.ts';
import { amountOfLine, isBlankLine } from '#shared/specs/line-amount.ts';
import type { VolumeUnit } from '#shared/text/format-quantity.ts';
import { roundedAmount, showAmountIn } from '#shared/text/show-amount.ts';

export interface ServesRow {
  readonly key: string;
  readonly name: string;
  readonly forAll: string;
  readonly forOne: string;
  readonly isTop: boolean;
}

export function servesRows(input: {
  readonly draft: DraftBody;
  readonly serves: number;
  readonly volumeUnit: VolumeUnit;
  readonly nameOf: (ingredientId: string) => string | null;
}): ServesRow[] {
  return input.draft.lines
    .filter((line) => !isBlankLine(line))
    .map((line) => {
      const read = amountOfLine(line);
      const shown = (serves: number): string =>
        read.ok
          ? showAmountIn(
              roundedAmount({ value: read.amount.value * serves, unit: read.amount.unit }),
              input.volumeUnit,
            )
          : 'no amount';
      const name = line.ingredientId === null ? null : input.nameOf(line.ingredientId);
      return {
        key: line.id,
        name: name ?? 'no ingredient yet',
        forAll: shown(input.serves),
        forOne: shown(1),
        isTop: line.stage === 'top',
      };
    });
}
