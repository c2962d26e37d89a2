import { smooth, smoothingAlpha, weightedDistortion, type WindowSeries } from '@overtally/dsp';
import { z } from 'zod';
import { analyseOneChannel } from '../analyse-case.js';
import { CannotServe, type Mapper, type Quantities } from '../quantities.js';

/** Lines of a window lie 5 Hz apart at the nominal frequency: its length is about 200 ms (IEC 61000-4-7, 4.4.1). */
const nominalLineSpacingHz = 5;

const groupSettings = z.object({
  cycles_per_window: z.number().int().positive(),
  highest_order: z.number().int().positive().default(40),
});

type Rows = 'line' | 'group' | 'subgroup' | 'interharmonicGroup' | 'centredSubgroup';

/** Names of the quantities, and the series and first order they are taken from. */
const spectra: [string, Rows, 0 | 1][] = [
  ['Yh', 'line', 1],
  ['Yg', 'group', 1],
  ['Ysg', 'subgroup', 1],
  ['Yig', 'interharmonicGroup', 0],
  ['Yisg', 'centredSubgroup', 0],
];

/** Family 4: lines, groups and distortion window by window, and their smoothing (IEC 61000-4-7). */
export const groupsAndSmoothing: Mapper = async (folder, one) => {
  const { cycles_per_window: cycles, highest_order: highest } = groupSettings.parse(one.analysis);
  const channel = await analyseOneChannel(folder, one, {
    profile: 'mains',
    nominalFrequencyHz: cycles * nominalLineSpacingHz,
    cyclesPerWindow: cycles,
    thdMaxOrder: highest,
  });
  const { series } = channel;
  if (series === null) throw new CannotServe('the record holds no whole window');
  return {
    f0_hz: channel.fundamental?.frequencyHz ?? null,
    windows: series.count,
    ...spectraOfWindow(series, highest, 0, 'first'),
    ...spectraOfWindow(series, highest, series.count - 1, 'last'),
    thd_h: ratios(series.thd),
    thdg: ratios(series.thdg),
    thds: ratios(series.thds),
    pwhd_h: ratios(series.pwhd),
    pwhd_g: Array.from(series.startS, (_, window) => weightedDistortion(column(series, 'group', window))),
    ...smoothedSpectrum(series, highest, 'group', 'Yg'),
    ...smoothedSpectrum(series, highest, 'subgroup', 'Ysg'),
    ...everyWindow(series, highest),
  };
};

/** All values of one order (or gap) over the windows. */
function row(series: WindowSeries, figure: Rows, index: number): Float64Array {
  return series[figure].subarray(index * series.count, (index + 1) * series.count);
}

/** All orders (or gaps) of one window. */
function column(series: WindowSeries, figure: Rows, window: number): Float64Array {
  return series[figure].filter((_, at) => at % series.count === window);
}

function spectraOfWindow(series: WindowSeries, highest: number, window: number, suffix: string): Quantities {
  const columns = spectra.map(([name, figure, first]) => {
    const values = column(series, figure, window).subarray(0, highest + 1 - first);
    return [`${name}_${suffix}`, [...values]];
  });
  return Object.fromEntries(columns) as Quantities;
}

/** Mean and largest of the smoothed values of every order (IEC 61000-4-7, 5.5.1, primed with the first window). */
function smoothedSpectrum(
  series: WindowSeries,
  highest: number,
  figure: 'group' | 'subgroup',
  name: string,
): Quantities {
  const smoothed = Array.from({ length: highest }, (_, index) => smoothedRow(series, figure, index));
  return {
    [`${name}_smoothed_avg`]: smoothed.map((values) => values.reduce((sum, y) => sum + y, 0) / values.length),
    [`${name}_smoothed_max`]: smoothed.map((values) => values.reduce((largest, y) => Math.max(largest, y))),
  };
}

function smoothedRow(series: WindowSeries, figure: Rows, index: number): Float64Array {
  return smooth(row(series, figure, index), smoothingAlpha(series.intervalS));
}

/** Group of every order window by window, and smoothed. */
function everyWindow(series: WindowSeries, highest: number): Quantities {
  const entries = Array.from({ length: highest }, (_, index) => {
    return [
      [`Yg_h${index + 1}`, [...row(series, 'group', index)]],
      [`Yg_smoothed_h${index + 1}`, [...smoothedRow(series, 'group', index)]],
    ];
  });
  return Object.fromEntries(entries.flat()) as Quantities;
}

function ratios(percent: Float64Array): number[] {
  return Array.from(percent, (value) => value / 100);
}
