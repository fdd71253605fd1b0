/** A share in the words of a message, to two digits: `"4.2 %"`. */
export const percent = (share: number): string => `${+(100 * share).toPrecision(2)} %`;
