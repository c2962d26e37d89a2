import { randomBytes } from 'node:crypto';

/** Digits of base 32 by D. Crockford: no I, L, O or U, which are mistaken for others. */
const digits = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';
const length = 16;

/** A new check code: 80 random bits as four groups of four, `7Q2M-K0ZV-1RXA-9D4H`. */
export function newCheckCode(): string {
  return grouped(Array.from(randomBytes(length), (byte) => digits[byte & 31]).join(''));
}

/**
 * A code as people type it, brought to the form in which it is stored: case, dashes and spaces do not matter, O is
 * read as 0, I and L as 1.
 * @returns null for what cannot be a code
 */
export function parsedCheckCode(text: string): string | null {
  const code = text.toUpperCase().replaceAll(/[\s-]/g, '').replaceAll('O', '0').replaceAll(/[IL]/g, '1');
  const isCode = code.length === length && [...code].every((digit) => digits.includes(digit));
  return isCode ? grouped(code) : null;
}

const grouped = (code: string): string => code.match(/.{4}/g)!.join('-');
