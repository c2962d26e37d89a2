import { angleDegrees, complexAbs, complexDivide, type Complex } from '../linear/complex.js';
import { trimLeadingZeros, type Polynomial } from './polynomial.js';
import { dcGain, type TransferFunction } from './transfer-function.js';

export interface ResponsePoint {
  frequencyHz: number;
  /** abs(H); null at a pole on the imaginary axis. */
  magnitude: number | null;
  /** 20 log10 abs(H); null at a pole and where H is zero. */
  magnitudeDb: number | null;
  /** arg H, (−180, 180]; null at a pole and where H is zero. */
  phaseDeg: number | null;
}

/** Response H(j2πf) at each of the frequencies, which may be 0. */
export function frequencyResponse(h: TransferFunction, frequenciesHz: ArrayLike<number>): ResponsePoint[] {
  return Array.from(frequenciesHz, (frequencyHz) => {
    const value = responseAt(h, frequencyHz);
    const magnitude = value && complexAbs(value);
    const isZero = magnitude === null || magnitude === 0;
    return {
      frequencyHz,
      magnitude,
      magnitudeDb: isZero ? null : 20 * Math.log10(magnitude),
      phaseDeg: isZero ? null : angleDegrees(value!),
    };
  });
}

/**
 * H(j2πf). Numerator and denominator are evaluated with their even and odd powers apart, so that real and imaginary part
 * each come from a real polynomial in ω², and in powers of 1/ω above ω = 1, so that high degrees do not overflow.
 *
 * @returns null at a pole on the imaginary axis
 */
export function responseAt(h: TransferFunction, frequencyHz: number): Complex | null {
  const omega = 2 * Math.PI * frequencyHz;
  if (omega === 0) {
    const gain = dcGain(h);
    return gain === null ? null : { re: gain, im: 0 };
  }
  const numerator = trimLeadingZeros(h.numerator);
  const denominator = trimLeadingZeros(h.denominator);
  const above = onImaginaryAxis(numerator, omega);
  const below = onImaginaryAxis(denominator, omega);
  if (below.re === 0 && below.im === 0) return null;
  const { re, im } = complexDivide(above, below);
  const power = Math.abs(omega) > 1 ? omega ** (numerator.length - denominator.length) : 1;
  return { re: re * power, im: im * power };
}

/** p(jω), above ω = 1 divided by ω^degree. */
function onImaginaryAxis(polynomial: Polynomial, omega: number): Complex {
  const isHigh = Math.abs(omega) > 1;
  const x = isHigh ? 1 / omega : omega;
  const degree = polynomial.length - 1;
  const parts: [number, number] = [0, 0];
  for (const parity of [0, 1] as const) {
    // Powers k of this parity with the sign of j^k, added from the one that x² is multiplied with most often.
    const powers = Array.from({ length: degree + 1 }, (_, k) => k).filter((k) => k % 2 === parity);
    const inOrder = isHigh ? powers : powers.reverse();
    let sum = 0;
    for (const k of inOrder) {
      const sign = k % 4 < 2 ? 1 : -1;
      sum = sum * x * x + sign * polynomial[degree - k]!;
    }
    const last = inOrder.at(-1);
    const exponent = last === undefined ? 0 : isHigh ? degree - last : last;
    parts[parity] = sum * x ** exponent;
  }
  return { re: parts[0], im: parts[1] };
}
