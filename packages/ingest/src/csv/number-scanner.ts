const POWERS = Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));
// Below this a mantissa can take one more digit and stay under 2^53.
const MANTISSA_LIMIT = 900719925474099;

/** Outcome of {@link NumberScanner.scan}. */
export const SCANNED = 0;
export const NOT_PLAIN = 1;

/**
 * Reads a decimal number from bytes without making text of it. The value is exactly that of `Number(text)`: the
 * mantissa is an integer below 2^53 and takes one multiplication or division by a power of ten up to 10^22, all of
 * them exact in binary, so that only one rounding occurs (Clinger, "How to Read Floating Point Numbers Accurately",
 * PLDI 1990, fast path). Anything else is left to the caller.
 */
export class NumberScanner {
  value = 0;
  /** Offset of the byte after the number. */
  next = 0;
  /** Digits after the decimal mark, or 100 + digits of the exponent: tells a cut number from a whole one. */
  tail = 0;

  constructor(private readonly decimalByte: number) {}

  scan(bytes: Uint8Array, from: number, end: number): number {
    let p = from;
    let byte = p < end ? (bytes[p] as number) : 0;
    const negative = byte === 45;
    if (negative || byte === 43) byte = ++p < end ? (bytes[p] as number) : 0;
    let mantissa = 0;
    let digits = 0;
    while (byte >= 48 && byte <= 57) {
      if (mantissa > MANTISSA_LIMIT) return NOT_PLAIN;
      mantissa = mantissa * 10 + (byte - 48);
      digits += 1;
      byte = ++p < end ? (bytes[p] as number) : 0;
    }
    let fraction = 0;
    if (byte === this.decimalByte) {
      byte = ++p < end ? (bytes[p] as number) : 0;
      while (byte >= 48 && byte <= 57) {
        if (mantissa > MANTISSA_LIMIT) return NOT_PLAIN;
        mantissa = mantissa * 10 + (byte - 48);
        fraction += 1;
        byte = ++p < end ? (bytes[p] as number) : 0;
      }
      if (this.decimalByte === 44 && fraction === 0) return NOT_PLAIN;
    }
    if (digits + fraction === 0) return NOT_PLAIN;
    this.tail = fraction;
    let exponent = -fraction;
    if (byte === 69 || byte === 101) {
      const start = p + 1;
      p = start;
      byte = p < end ? (bytes[p] as number) : 0;
      const down = byte === 45;
      if (down || byte === 43) byte = ++p < end ? (bytes[p] as number) : 0;
      const firstDigit = p;
      let size = 0;
      while (byte >= 48 && byte <= 57 && size < 10000) {
        size = size * 10 + (byte - 48);
        byte = ++p < end ? (bytes[p] as number) : 0;
      }
      if (p === firstDigit) return NOT_PLAIN;
      this.tail = 100 + p - firstDigit;
      exponent += down ? -size : size;
    }
    if (exponent < -22 || exponent > 22) return NOT_PLAIN;
    const power = POWERS[exponent < 0 ? -exponent : exponent] as number;
    const size = exponent < 0 ? mantissa / power : mantissa * power;
    this.value = negative ? -size : size;
    this.next = p;
    return SCANNED;
  }
}
