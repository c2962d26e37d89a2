import { Injectable } from '@nestjs/common';
import type { Aggregation, Series, SeriesFigure, SeriesQuery } from '@overtally/contracts';
import type { schema } from '@overtally/db';
import { aggregateSeries, WINDOWS_PER_10_MIN, WINDOWS_PER_3_S } from '@overtally/dsp';
import { problem } from '../../common/problem.js';
import { readNpy } from '../../storage/npy.js';
import { Storage } from '../../storage/storage.js';
import type { AnalysisChannelRow } from '../analyses.repository.js';
import { AnalysesService } from '../analyses.service.js';
import { firstRow, placeOf, type StoredFigure } from './series-layout.js';
import { thinnedSeries, type SeriesPoints } from './thinned-series.js';

interface StoredChannelSeries {
  key: string;
  shape: schema.StoredSeries;
}

/** Figures of a channel from window to window, as stored or aggregated. */
@Injectable()
export class SeriesService {
  constructor(
    private readonly analyses: AnalysesService,
    private readonly storage: Storage,
  ) {}

  /**
   * One figure over time in at most `maxPoints` points.
   * @throws 409 until the analysis is done, 404 for a channel, figure or order that was not followed
   */
  async figure(id: string, query: SeriesQuery): Promise<Series> {
    const { figure, aggregation, maxPoints } = query;
    const channel = await this.analyses.channel(id, query.channel);
    const stored = storedSeries(channel);
    const row = rowOf(stored.shape, figure, query.order);
    const factor = windowsPerInterval(aggregation, channel, stored.shape);
    const [timeS, flagged, value] = await Promise.all([
      this.row(stored, 'start', 0),
      this.row(stored, 'flagged', 0),
      this.row(stored, figure, row),
    ]);
    return {
      channel: channel.index,
      figure,
      order: firstRow[figure] === null ? null : query.order,
      unit: unitOf(figure, channel.unit),
      aggregation,
      intervalS: factor * stored.shape.intervalS,
      ...thinnedSeries(aggregated({ timeS, flagged, value }, factor), maxPoints),
    };
  }

  private row({ key, shape }: StoredChannelSeries, figure: StoredFigure, row: number): Promise<Float64Array> {
    const from = placeOf(shape, figure).offset + row * shape.count;
    return readNpy(this.storage, key, from, from + shape.count);
  }
}

function storedSeries({ series, seriesKey }: AnalysisChannelRow): StoredChannelSeries {
  if (series !== null && seriesKey !== null) return { shape: series, key: seriesKey };
  const detail =
    'Nothing was followed over time for this channel: only the mains profile does so, on a record of whole windows';
  throw problem(404, 'no-series', detail);
}

/** Index of the row of an order, gap or band. */
function rowOf(shape: schema.StoredSeries, figure: SeriesFigure, order: number): number {
  const { rows } = placeOf(shape, figure);
  const first = firstRow[figure];
  if (first === null) return 0;
  if (order >= first && order < first + rows) return order - first;
  throw problem(404, 'no-such-order', absence(figure, first, rows, order));
}

function absence(figure: SeriesFigure, first: number, rows: number, order: number): string {
  if (figure === 'band') {
    return rows === 0
      ? 'The sample rate does not reach the bands of 200 Hz from 2 kHz to 9 kHz'
      : `The bands have the numbers 0 to ${rows - 1}; there is no band ${order}`;
  }
  const last = first + rows - 1;
  return rows === 0
    ? 'No orders were followed in this analysis'
    : `Orders ${first} to ${last} were followed; there is no order ${order} of this figure`;
}

/** 150/180 cycles and 10 min in windows of 10/12 cycles (IEC 61000-4-30, 4.4); of other windows the nearest number. */
function windowsPerInterval(
  aggregation: Aggregation,
  { windows }: AnalysisChannelRow,
  { intervalS }: schema.StoredSeries,
): number {
  if (aggregation === 'window') return 1;
  const isStandard = windows?.cycles === 10 || windows?.cycles === 12;
  const [standard, seconds] = aggregation === '3s' ? [WINDOWS_PER_3_S, 3] : [WINDOWS_PER_10_MIN, 600];
  return isStandard ? standard : Math.max(1, Math.round(seconds / intervalS));
}

function aggregated(points: SeriesPoints & { flagged: ArrayLike<number> }, factor: number): SeriesPoints {
  if (factor === 1) return points;
  const { values, flagged } = aggregateSeries(points.value, points.flagged, factor);
  const timeS = Float64Array.from(values, (_, i) => points.timeS[i * factor]!);
  return { timeS, value: values, flagged };
}

function unitOf(figure: SeriesFigure, unit: string): string {
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
      return unit;
  }
}
