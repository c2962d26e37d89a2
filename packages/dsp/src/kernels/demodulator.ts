import { createKernel, type Kernel } from '../wasm/kernel.js';

/** Σ w_n x_n e^(−jα_n) of the samples from `offset`. */
export type Demodulate = (samples: Float64Array, offset: number) => { re: number; im: number };

/**
 * Demodulation of frames of one length by a table, for the phase of a component in many frames. As compiled code where
 * the platform has it.
 *
 * @param cosine w_n cos α_n
 * @param sine w_n sin α_n, as many
 */
export function createDemodulator(cosine: Float64Array, sine: Float64Array): Demodulate {
  const kernel = createKernel();
  return kernel === null ? plainDemodulator(cosine, sine) : kernelDemodulator(kernel, cosine, sine);
}

function kernelDemodulator(kernel: Kernel, cosine: Float64Array, sine: Float64Array): Demodulate {
  const length = cosine.length;
  const cosineAt = kernel.allocate(length);
  const sineAt = kernel.allocate(length);
  const frameAt = kernel.allocate(length);
  const outAt = kernel.allocate(2);
  kernel.floats(cosineAt, length).set(cosine);
  kernel.floats(sineAt, length).set(sine);
  const frame = kernel.floats(frameAt, length);
  const out = kernel.floats(outAt, 2);
  return (samples, offset) => {
    frame.set(samples.subarray(offset, offset + length));
    kernel.functions.demodulate(frameAt, cosineAt, sineAt, length, outAt);
    return { re: out[0]!, im: out[1]! };
  };
}

/** The same in plain TypeScript. */
export function plainDemodulator(cosine: Float64Array, sine: Float64Array): Demodulate {
  return (samples, offset) => {
    let re = 0;
    let im = 0;
    for (let i = 0; i < cosine.length; i++) {
      const x = samples[offset + i]!;
      re += x * cosine[i]!;
      im -= x * sine[i]!;
    }
    return { re, im };
  };
}
