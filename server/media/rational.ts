/** An exact ratio of two whole numbers, such as 30000/1001 pictures a second. */
export interface Rational {
  num: number;
  den: number;
}

function greatestCommonDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestCommonDivisor(b, a % b);
}

/** The same ratio in lowest terms. Both parts must be whole and `den` positive. */
export function reduce({ num, den }: Rational): Rational {
  const divisor = greatestCommonDivisor(Math.abs(num), den) || 1;
  return { num: num / divisor, den: den / divisor };
}

/** The ratio as a plain number. */
export function toNumber({ num, den }: Rational): number {
  return num / den;
}

/** Reads `30000/1001` or `16:11`; `null` for anything else and for zero over or under the line. */
export function parseRational(text: string | undefined): Rational | null {
  const match = /^(\d{1,9})[/:](\d{1,9})$/.exec(text ?? '');
  const num = Number(match?.[1]);
  const den = Number(match?.[2]);
  return num > 0 && den > 0 ? reduce({ num, den }) : null;
}
