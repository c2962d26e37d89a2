import { angleDegrees, complexAbs, type Complex } from '../linear/complex.js';
import { axisPolynomial, evaluateOnAxis } from './axis-polynomial.js';
import { trimLeadingZeros } from './polynomial.js';
import { dcGain, type Response, type TransferFunction } from './transfer-function.js';

export interface ResponsePoint {
  frequencyHz: number;
  /** abs(H); null at a pole on the imaginary axis. */
  magnitude: number | null;
  /** 20 log10 abs(H); null at a pole and where H is zero. */
  magnitudeDb: number | null;
  /** arg H, (−180, 180]; null at a pole and where H is zero. */
  phaseDeg: number | null;
}

/** One stage or several in series; the whole response is their product. */
export type StageChain = TransferFunction | readonly TransferFunction[];

/** The stages of a chain, one by one. */
export function stagesOf(chain: StageChain): readonly TransferFunction[] {
  return 'numerator' in chain ? [chain] : chain;
}

/** Sum of the pure delays of stages in series, in seconds. */
export function totalDelay(chain: StageChain): number {
  return stagesOf(chain).reduce((sum, { delayS = 0 }) => sum + delayS, 0);
}

/** Response H(j2πf) of a stage or of stages in series at each of the frequencies, which may be 0. */
export function frequencyResponse(
  chain: StageChain | Response,
  frequenciesHz: ArrayLike<number>,
): ResponsePoint[] {
  const response = typeof chain === 'function' ? chain : responseOf(chain);
  return Array.from(frequenciesHz, (frequencyHz) => responsePoint(frequencyHz, response(frequencyHz)));
}

/** A value of a response as magnitude, decibels and angle. */
export function responsePoint(frequencyHz: number, value: Complex | null): ResponsePoint {
  const magnitude = value && complexAbs(value);
  const isZero = magnitude === null || magnitude === 0;
  return {
    frequencyHz,
    magnitude,
    magnitudeDb: isZero ? null : 20 * Math.log10(magnitude),
    phaseDeg: isZero ? null : angleDegrees(value!),
  };
}

/** H(j2πf) at one frequency; see `responseOf`. */
export function responseAt(h: TransferFunction, frequencyHz: number): Complex | null {
  return responseOf(h)(frequencyHz);
}

/**
 * H(j2πf) as a function of f, made ready for many frequencies. Stages are evaluated one by one and multiplied, so that no
 * polynomial of high degree is formed; a delay T turns by exactly −2πfT.
 */
export function responseOf(chain: StageChain): Response {
  const responses = stagesOf(chain).map(stageResponse);
  return (frequencyHz) => {
    let re = 1;
    let im = 0;
    for (const response of responses) {
      const factor = response(frequencyHz);
      if (factor === null) return null;
      const next = re * factor.re - im * factor.im;
      im = re * factor.im + im * factor.re;
      re = next;
    }
    return { re, im };
  };
}

function stageResponse(h: TransferFunction): Response {
  if (h.exact) return h.exact.response;
  const numerator = axisPolynomial(trimLeadingZeros(h.numerator));
  const denominator = axisPolynomial(trimLeadingZeros(h.denominator));
  const excess = numerator.degree - denominator.degree;
  const gain = dcGain(h);
  const atZero = gain === null ? null : { re: gain, im: 0 };
  const above: Complex = { re: 0, im: 0 };
  const below: Complex = { re: 0, im: 0 };
  const { delayS = 0 } = h;
  return (frequencyHz) => {
    if (frequencyHz === 0) return atZero;
    const omega = 2 * Math.PI * frequencyHz;
    evaluateOnAxis(numerator, omega, above);
    evaluateOnAxis(denominator, omega, below);
    // A power of two near the size of the denominator keeps its square from overflow and from vanishing.
    const size = Math.max(Math.abs(below.re), Math.abs(below.im));
    if (size === 0) return null;
    const c = below.re / size;
    const d = below.im / size;
    const scale = (Math.abs(omega) > 1 ? omega ** excess : 1) / ((c * c + d * d) * size);
    const re = (above.re * c + above.im * d) * scale;
    const im = (above.im * c - above.re * d) * scale;
    return delayS === 0 ? { re, im } : turned(re, im, frequencyHz * delayS);
  };
}

/** Turned back by a number of full turns, whole ones taken out first. */
function turned(re: number, im: number, turns: number): Complex {
  const angle = 2 * Math.PI * (turns - Math.round(turns));
  const cosine = Math.cos(angle);
  const sine = Math.sin(angle);
  return { re: re * cosine + im * sine, im: im * cosine - re * sine };
}
