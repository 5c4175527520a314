import { fraction, type Fraction } from './fractions';

/** A number as somebody typed it: its exact value, the digits untouched, and what stood behind them. */
export type TypedNumber = { exact: Fraction; digits: string; isFraction: boolean; behind: string };

const MOST_CHARACTERS = 40;
const LARGEST_DENOMINATOR = 4096n;

const decimal = /^(?=.*\d)([+-]?)(\d{0,9})(?:[.,](\d{0,6}))?$/;
const mixed = /^([+-]?)(?:(\d{1,6})(?:\s+|-))?(\d{1,6})\s*\/\s*(\d{1,6})$/;
const withUnit = /^(.*?\d)\s*(|\s64ths?|[^\d\s.,/+-][^\d/]*)$/i;
const eitherThousandsOrDecimals = /^[+-]?[1-9]\d{0,2},\d{3}$/;

/**
 * Reads `25.5`, `.010`, `1,5`, `1/64`, `3 1/2`, `3-1/2` and `3½`, with or without a unit behind, exactly.
 * A message says what to do instead.
 */
export function readTypedNumber(text: string): { ok: true; number: TypedNumber } | { ok: false; message: string } {
  const plain = plainText(text);
  if (plain === '') return refused('Write a number here, such as 25.5 or 25 1/2.');
  const [, digits = plain, behind = ''] = withUnit.exec(plain) ?? [];
  if (plain.length > MOST_CHARACTERS || !(decimal.test(digits) || mixed.test(digits))) {
    return refused(`"${shortened(text)}" is not a number. Write it as 25.5, .010 or 25 1/2.`);
  }
  if (eitherThousandsOrDecimals.test(digits)) {
    return refused(
      `"${digits}" can be read two ways. Write ${digits.replace(',', '.')} or ${digits.replace(',', '')}.`,
    );
  }
  return exactly(digits, behind.trim());
}

function exactly(digits: string, behind: string): { ok: true; number: TypedNumber } | { ok: false; message: string } {
  const typedFraction = mixed.exec(digits);
  if (!typedFraction) return { ok: true, number: { exact: fromDecimal(digits), digits, isFraction: false, behind } };
  const [, sign = '', whole = '0', above = '0', below = '0'] = typedFraction;
  const denominator = BigInt(below);
  if (denominator === 0n) return refused(`"${digits}" has 0 below its line. Write a fraction such as 1/64.`);
  if (denominator > LARGEST_DENOMINATOR) {
    return refused(`"${digits}" is finer than anyone can cut. Write it as a decimal, such as 0.0156.`);
  }
  const numerator = BigInt(whole) * denominator + BigInt(above);
  const exact = fraction(sign === '-' ? -numerator : numerator, denominator);
  return { ok: true, number: { exact, digits, isFraction: true, behind } };
}

function fromDecimal(digits: string): Fraction {
  const [, sign = '', whole = '', decimals = ''] = decimal.exec(digits) ?? [];
  return fraction(BigInt(`${sign === '-' ? '-' : ''}${whole}${decimals}`), 10n ** BigInt(decimals.length));
}

/** Vulgar fractions become `1/2`, a true minus sign becomes `-`, runs of white space one space. */
function plainText(text: string): string {
  return text
    .replace(/[¼-¾⅐-⅞]/g, (sign) => ` ${sign.normalize('NFKC').replace('⁄', '/')}`)
    .replace(/⁄/g, '/')
    .replace(/[−–]/g, '-')
    .replace(/\s+/g, ' ')
    .trim();
}

function shortened(text: string): string {
  const typed = text.trim();
  return typed.length > MOST_CHARACTERS ? `${typed.slice(0, MOST_CHARACTERS)}…` : typed;
}

function refused(message: string): { ok: false; message: string } {
  return { ok: false, message };
}
