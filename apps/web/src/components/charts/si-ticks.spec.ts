import { describe, expect, it } from 'vitest';
import { decadeTicks, linearTicks } from './si-ticks.js';

/** No-break space between number and unit (SI brochure, 9th ed., 5.4.3). */
const gap = '\u00a0';

describe('axis ticks', () => {
  it('stand at round values with prefixes', () => {
    expect(linearTicks(-6, 6, 'A', 3)).toEqual({
      tickvals: [-5, 0, 5],
      ticktext: [`\u22125${gap}A`, `0${gap}A`, `5${gap}A`],
    });
    expect(linearTicks(0, 0.35, 'V').ticktext).toEqual(
      ['0', '100', '200', '300'].map((text) => `${text}${gap}${text === '0' ? '' : 'm'}V`),
    );
  });

  it('show more than the zero of a mains voltage', () => {
    expect(linearTicks(-350, 350, 'V', 3).tickvals).toEqual([-200, 0, 200]);
  });

  it('take as many digits as tell them apart', () => {
    expect(linearTicks(49.976, 49.9849, 'Hz', 3).ticktext).toEqual([
      `49.976${gap}Hz`,
      `49.978${gap}Hz`,
      `49.98${gap}Hz`,
      `49.982${gap}Hz`,
      `49.984${gap}Hz`,
    ]);
  });

  it('carry no rounding residue of the binary steps', () => {
    expect(linearTicks(0, 0.3, '', 3).ticktext).toEqual(['0', '0.1', '0.2', '0.3']);
  });

  it('stand at decades on a logarithmic axis, thinned when there are many', () => {
    expect(decadeTicks(0.005, 2.3, 'A')).toEqual({
      tickvals: [1, 0.1, 0.01],
      ticktext: [`1${gap}A`, `100${gap}mA`, `10${gap}mA`],
    });
    expect(decadeTicks(1e-9, 1, 'V', 5).tickvals).toEqual([1, 1e-2, 1e-4, 1e-6, 1e-8]);
  });

  it('are absent for an empty or impossible range', () => {
    expect(linearTicks(1, 1, 'A').tickvals).toEqual([]);
    expect(decadeTicks(0, 1, 'A').tickvals).toEqual([]);
  });
});
