import type { Aggregation, SeriesFigure } from '@overtally/contracts';
import type { schema } from '@overtally/db';
import { WINDOWS_PER_10_MIN, WINDOWS_PER_3_S } from '@overtally/dsp';
import { problem } from '../../common/problem.js';
import { readNpy } from '../../storage/npy.js';
import type { Storage } from '../../storage/storage.js';
import type { AnalysisChannelRow } from '../analyses.repository.js';
import { placeOf, type StoredFigure } from './series-layout.js';

/** The series of a channel that were stored. */
export interface StoredChannelSeries {
  key: string;
  shape: schema.StoredSeries;
}

/** @throws 404 for a channel of which nothing was followed */
export function storedSeries({ series, seriesKey }: AnalysisChannelRow): StoredChannelSeries {
  if (series !== null && seriesKey !== null) return { shape: series, key: seriesKey };
  const detail =
    'Nothing was followed over time for this channel: only the mains profile does so, on a record of whole windows';
  throw problem(404, 'no-series', detail);
}

/** Values of windows `from` up to but not including `to` of one row of a figure; row 0 is the first. */
export function readRow(
  storage: Storage,
  { key, shape }: StoredChannelSeries,
  figure: StoredFigure,
  row: number,
  [from, to]: [number, number] = [0, shape.count],
): Promise<Float64Array> {
  const start = placeOf(shape, figure).offset + row * shape.count;
  return readNpy(storage, key, start + from, start + to);
}

/** 150/180 cycles and 10 min in windows of 10/12 cycles (IEC 61000-4-30, 4.4); of other windows the nearest number. */
export function windowsPerInterval(
  aggregation: Aggregation,
  { windows }: AnalysisChannelRow,
  { intervalS }: schema.StoredSeries,
): number {
  if (aggregation === 'window') return 1;
  const isStandard = windows?.cycles === 10 || windows?.cycles === 12;
  const [standard, seconds] = aggregation === '3s' ? [WINDOWS_PER_3_S, 3] : [WINDOWS_PER_10_MIN, 600];
  return isStandard ? standard : Math.max(1, Math.round(seconds / intervalS));
}

/** Unit of the values of a figure. */
export function unitOf(figure: SeriesFigure, channelUnit: string): string {
  switch (figure) {
    case 'frequency':
      return 'Hz';
    case 'thd':
    case 'thdg':
    case 'thds':
    case 'pwhd':
      return '%';
    case 'rms':
    case 'line':
    case 'group':
    case 'subgroup':
    case 'interharmonicGroup':
    case 'centredSubgroup':
    case 'band':
      return channelUnit;
  }
}
