import type { DistortionSeries, ReportSection } from '@overtally/contracts';
import { formatPercent, formatQuantity, formatTick } from './format.js';
import type { Sheet } from './sheet.js';
import { colours, hairline, text } from './theme.js';
import { niceTicks } from './ticks.js';

const axisWidth = 44;
const axisHeight = 18;
/** Part of the range that stays free above and below the curve. */
const headroom = 0.08;
/** Fewer points than these are told by the figures alone. */
const leastIntervals = 8;

interface Curve {
  height: number;
  /** Places along the time axis in s, ascending. */
  timeS: readonly number[];
  /** One run of values, or a lower and an upper one; null breaks the line. */
  runs: readonly (readonly (number | null)[])[];
  unit: string;
  /** Whether zero belongs on the scale whatever the values. */
  fromZero: boolean;
  alt: string;
}

/** The first cycles of the judged channel, so that a reader sees what the orders are of. */
export function drawWaveform(sheet: Sheet, { waveform, verdict }: ReportSection): void {
  sheet.heading(`${verdict.channelName} against time`, 130);
  if (waveform === null) {
    sheet.paragraph('No waveform is shown: the samples of the recording could not be read.', text.soft);
    return;
  }
  const runs = waveform.kind === 'samples' ? [waveform.values] : [waveform.minimum, waveform.maximum];
  const values = runs.flat().filter((value) => value !== null);
  if (values.length === 0) return;
  const timeS = runs[0]!.map((_, index) => waveform.startS + index * waveform.stepS);
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const lengthS = timeS[timeS.length - 1]! - timeS[0]!;
  const alt = `Waveform of ${verdict.channelName} over ${formatQuantity(lengthS, 's', 3)}, from ${formatQuantity(low, waveform.unit)} to ${formatQuantity(high, waveform.unit)}.`;
  drawCurve(sheet, { height: 92, timeS, runs, unit: waveform.unit, fromZero: true, alt });
}

/** Distortion from window to window, where the record is long enough to show something. */
export function drawDistortion(sheet: Sheet, { distortion, verdict }: ReportSection): void {
  if (distortion === null || distortion.timeS.length < leastIntervals) return;
  const values = distortion.value.filter((value) => value !== null);
  if (values.length === 0) return;
  sheet.heading('Distortion over the record', 95);
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const alt = `THD of subgroups of ${verdict.channelName} over the record, between ${formatPercent(low)} and ${formatPercent(high)}.`;
  const { timeS, value, unit } = distortion;
  drawCurve(sheet, { height: 52, timeS, runs: [value], unit, fromZero: true, alt });
  sheet.paragraph(distortionCaption(distortion), text.caption, 'Caption');
}

const distortionCaption = ({ intervalS, thinned }: DistortionSeries): string =>
  `THD of subgroups (IEC 61000-4-7, 3.3), one value each ${formatQuantity(intervalS, 's', 3)}${
    thinned ? '; drawn are the largest of neighbouring values' : ''
  }.`;

function drawCurve(sheet: Sheet, curve: Curve): void {
  const { doc } = sheet;
  const { height, timeS, runs, unit, fromZero, alt } = curve;
  sheet.room(height + axisHeight + 8);
  const top = sheet.y + 4;
  const left = sheet.left + axisWidth;
  const width = sheet.width - axisWidth;
  const values = runs.flat().filter((value) => value !== null);
  const bounds = fromZero ? [0, ...values] : values;
  const ticks = niceTicks(Math.min(...bounds), Math.max(...bounds), height > 70 ? 4 : 2);
  const [least, most] = [Math.min(...bounds), Math.max(...bounds)];
  const air = (most - least || 1) * headroom;
  const [low, high] = [least < 0 ? least - air : least, most + air];
  const range = high - low;
  const [start, end] = [timeS[0]!, timeS[timeS.length - 1]!];
  const x = (time: number): number => left + ((time - start) / (end - start || 1)) * width;
  const y = (value: number): number => top + height * (1 - (value - low) / range);
  sheet.tag(
    'Figure',
    () => {
      for (const tick of ticks.filter((each) => each >= low && each <= high)) {
        doc
          .lineWidth(hairline)
          .moveTo(left, y(tick))
          .lineTo(left + width, y(tick))
          .stroke(tick === 0 ? colours.ruleStrong : colours.rule);
        sheet.line(formatTick(tick, unit), text.axis, sheet.left, y(tick) - 4, {
          width: axisWidth - 6,
          align: 'right',
        });
      }
      drawRuns(sheet, runs, (index) => x(timeS[index]!), y);
      drawTimeAxis(sheet, { start, end, left, width, foot: top + height }, x);
    },
    { alt },
  );
  sheet.y = top + height + axisHeight;
}

/** A line of samples; of an envelope the ground between its two lines as well. */
function drawRuns(
  { doc }: Sheet,
  runs: Curve['runs'],
  x: (index: number) => number,
  y: (value: number) => number,
): void {
  doc.save().lineJoin('round');
  const [lower, upper] = runs;
  if (lower && upper) {
    upper.forEach((value, index) => {
      const under = lower[index] ?? null;
      if (value === null || under === null) return;
      doc.moveTo(x(index), y(under)).lineTo(x(index), y(value));
    });
    doc.lineWidth(0.7).stroke(colours.ink);
  }
  for (const run of runs) {
    let drawing = false;
    run.forEach((value, index) => {
      if (value === null) drawing = false;
      else if (drawing) doc.lineTo(x(index), y(value));
      else {
        doc.moveTo(x(index), y(value));
        drawing = true;
      }
    });
    doc.lineWidth(0.8).stroke(colours.ink);
  }
  doc.restore();
}

function drawTimeAxis(
  sheet: Sheet,
  { start, end, left, width, foot }: Record<'start' | 'end' | 'left' | 'width' | 'foot', number>,
  x: (time: number) => number,
): void {
  sheet.doc
    .lineWidth(0.8)
    .moveTo(left, foot)
    .lineTo(left + width, foot)
    .stroke(colours.ink);
  const half = 20;
  for (const tick of niceTicks(start, end, 8).filter((time) => time >= start && time <= end)) {
    const at = x(tick);
    sheet.doc
      .lineWidth(hairline)
      .moveTo(at, foot)
      .lineTo(at, foot + 2.5)
      .stroke(colours.ink);
    const align = at + half > left + width ? 'right' : 'center';
    const from = align === 'right' ? left + width - 2 * half : at - half;
    sheet.line(tick === 0 ? '0\u00a0s' : formatTick(tick, 's'), text.axis, from, foot + 4, {
      width: 2 * half,
      align,
    });
  }
}
