/** Orders of the band-limited square wave below. */
const squareOrders = Array.from({ length: 20 }, (_, i) => 2 * i + 1);

/**
 * A square wave of amplitude 1 cut off above order 39: the sum of 4/(pi h) sin(2 pi h f t) over odd h, its Fourier
 * series in closed form.
 */
export function squareWave(sampleRateHz: number, sampleCount: number, fundamentalHz = 50): Float64Array {
  return Float64Array.from({ length: sampleCount }, (_, n) => {
    const t = n / sampleRateHz;
    return squareOrders.reduce(
      (sum, h) => sum + (4 / (Math.PI * h)) * Math.sin(2 * Math.PI * h * fundamentalHz * t),
      0,
    );
  });
}

/** A wave of `count` samples, some of its whole cycles over and over. */
export function repeated(cycles: Float64Array, count: number): Float32Array {
  return Float32Array.from({ length: count }, (_, n) => cycles[n % cycles.length]!);
}

/** THD of that wave relative to the fundamental in percent: sqrt(sum of 1/h^2 over odd h from 3 to 39), 47.03 %. */
export const squareThdFPercent =
  100 * Math.sqrt(squareOrders.slice(1).reduce((sum, h) => sum + 1 / h ** 2, 0));

/** A table of time and one column, as a bench instrument exports it. */
export function csvOf(
  samples: Float64Array,
  sampleRateHz: number,
  { header = 'time (s),u (V)', delimiter = ',', decimal = '.' } = {},
): Buffer {
  const number = (value: number) => String(value).replace('.', decimal);
  const rows = Array.from(samples, (value, n) => number(n / sampleRateHz) + delimiter + number(value));
  return Buffer.from([header, ...rows, ''].join('\n'));
}

/** A WAV file of 32-bit float samples (RIFF, format tag 3, IEEE float). */
export function wavOf(channels: Float32Array[], sampleRateHz: number): Buffer {
  const frames = channels[0]?.length ?? 0;
  const blockBytes = 4 * channels.length;
  const data = Buffer.alloc(frames * blockBytes);
  channels.forEach((samples, c) =>
    samples.forEach((value, n) => data.writeFloatLE(value, n * blockBytes + 4 * c)),
  );
  const head = Buffer.alloc(44);
  head.write('RIFF', 0);
  head.writeUInt32LE(36 + data.length, 4);
  head.write('WAVEfmt ', 8);
  head.writeUInt32LE(16, 16);
  head.writeUInt16LE(3, 20);
  head.writeUInt16LE(channels.length, 22);
  head.writeUInt32LE(sampleRateHz, 24);
  head.writeUInt32LE(sampleRateHz * blockBytes, 28);
  head.writeUInt16LE(blockBytes, 32);
  head.writeUInt16LE(32, 34);
  head.write('data', 36);
  head.writeUInt32LE(data.length, 40);
  return Buffer.concat([head, data]);
}
