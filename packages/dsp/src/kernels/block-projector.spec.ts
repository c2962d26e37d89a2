import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createBlockProjector, plainProjector, type ProjectBlock } from './block-projector.js';

const ANGLES = Float64Array.of(0, 0.013, 0.7, 2.9);

describe.each([
  ['as compiled code where the platform has it', createBlockProjector],
  ['in plain TypeScript', plainProjector],
])('block projector %s', (_, create) => {
  // Outside truth: the sums of the definition.
  it.each([
    [2, 4],
    [4, 8],
    [6, 12],
    [7, 14],
    [128, 256],
    [128, 255],
    [128, 1],
  ])('gives the defining sums, half %i, %i samples', (half, length) => {
    const samples = seededNoise(length + 5, 8);
    for (const timed of [false, true]) {
      expectSums(create(ANGLES, half, timed), samples, 3, 3 + length, { half, timed });
    }
  });

  it('does not carry samples over to a shorter block', () => {
    const samples = seededNoise(600, 9);
    const project = create(ANGLES, 128, true);
    project(samples, 0, 256);
    expectSums(project, samples, 256, 300, { half: 128, timed: true });
  });
});

function expectSums(
  project: ProjectBlock,
  samples: Float64Array,
  from: number,
  to: number,
  { half, timed }: { half: number; timed: boolean },
): void {
  const sums = project(samples, from, to);
  const each = timed ? 4 : 2;
  expect(sums).toHaveLength(each * ANGLES.length);
  ANGLES.forEach((angle, c) => {
    const expected = [0, 0, 0, 0];
    for (let n = from; n < to; n++) {
      const tau = n - from - (half - 0.5);
      const x = samples[n]!;
      expected[0]! += x * Math.cos(angle * tau);
      expected[1]! -= x * Math.sin(angle * tau);
      expected[2]! += tau * x * Math.cos(angle * tau);
      expected[3]! -= tau * x * Math.sin(angle * tau);
    }
    for (let i = 0; i < each; i++) expect(sums[each * c + i]).toBeCloseTo(expected[i]!, 9);
  });
}
