/** Raised whenever the same inputs would give other figures; stored with every version. */
export const CALCULATION_VERSION = '1';
