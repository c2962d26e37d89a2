import { AnalysisInputError } from '../errors.js';
import { complexAdd, complexDivide, type Complex } from '../linear/complex.js';
import { inSeries, MAX_PADE_ORDER, withPadeDelay } from './compose.js';
import { responseOf, stagesOf, type StageChain } from './frequency-response.js';
import { nyquist } from './nyquist.js';
import { addPolynomials, multiplyPolynomials, type Polynomial } from './polynomial.js';
import { transferFunction, type Response, type TransferFunction } from './transfer-function.js';

/** Which answer of a loop with unity feedback is meant. */
export type LoopOutput = 'reference-to-output' | 'reference-to-error' | 'disturbance-to-output';

/**
 * A loop of controller C and plant G with unity negative feedback: C G/(1 + C G) from reference to output, 1/(1 + C G) from
 * reference to error, G/(1 + C G) from a disturbance at the input of the plant to the output. All three have the full
 * characteristic polynomial as denominator, so a mode that C and G cancel between them stays visible.
 *
 * With a delay in the loop the coefficients stand for it by a Padé approximant, from which poles and answers in time come;
 * the frequency response stays that of the exact loop, and its stability is judged by the Nyquist criterion.
 *
 * @param padeOrder order of the Padé approximant that stands for delays within the loop
 * @throws AnalysisInputError when there is a delay and no order is given (closed, it has infinitely many poles), or when
 *   1 + C G is zero
 */
export function closeLoop(
  controller: StageChain,
  plant: StageChain,
  output: LoopOutput = 'reference-to-output',
  padeOrder?: number,
): TransferFunction {
  const [exactC, exactG] = [inSeries(controller), inSeries(plant)];
  const hasDelay = exactC.delayS !== undefined || exactG.delayS !== undefined;
  const c = rational(exactC, padeOrder);
  const g = rational(exactG, padeOrder);
  const forward = multiplyPolynomials(c.numerator, g.numerator);
  const open = multiplyPolynomials(c.denominator, g.denominator);
  const characteristic = addPolynomials(open, forward);
  if (characteristic.length === 0) {
    throw new AnalysisInputError(
      'The loop gain is −1 at every frequency: the loop has no solution. Change its gain.',
    );
  }
  const numerators: Record<LoopOutput, () => Polynomial> = {
    'reference-to-output': () => forward,
    'reference-to-error': () => open,
    'disturbance-to-output': () => multiplyPolynomials(g.numerator, c.denominator),
  };
  const closed = transferFunction(numerators[output](), characteristic);
  if (!hasDelay) return closed;
  return {
    ...closed,
    exact: {
      response: exactResponse(controller, plant, output, responseOf(closed)),
      stability: nyquist([...stagesOf(controller), ...stagesOf(plant)]),
    },
  };
}

const ONE: Complex = { re: 1, im: 0 };

function exactResponse(
  controller: StageChain,
  plant: StageChain,
  output: LoopOutput,
  approximate: Response,
): Response {
  const [c, g] = [responseOf(controller), responseOf(plant)];
  const loop = responseOf([...stagesOf(controller), ...stagesOf(plant)]);
  return (frequencyHz) => {
    const l = loop(frequencyHz);
    const own = g(frequencyHz);
    // At a pole of the open loop on the axis the closed loop follows from the coefficients, where it is finite.
    if (l === null || own === null || c(frequencyHz) === null) return approximate(frequencyHz);
    const below = complexAdd(ONE, l);
    if (below.re === 0 && below.im === 0) return null;
    const above = { 'reference-to-output': l, 'reference-to-error': ONE, 'disturbance-to-output': own }[
      output
    ];
    return complexDivide(above, below);
  };
}

function rational(h: TransferFunction, padeOrder: number | undefined): TransferFunction {
  if (h.delayS === undefined) return h;
  if (padeOrder === undefined) {
    throw new AnalysisInputError(
      `The loop holds a delay of ${h.delayS} s and so has infinitely many poles. State a Padé order from 1 to ` +
        `${MAX_PADE_ORDER}, or judge the loop by the Nyquist criterion.`,
    );
  }
  return withPadeDelay(h, padeOrder);
}
