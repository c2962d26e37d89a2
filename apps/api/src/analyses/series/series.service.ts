import { Injectable } from '@nestjs/common';
import type { Series, SeriesFigure, SeriesQuery, SeriesTableQuery } from '@overtally/contracts';
import type { schema } from '@overtally/db';
import { aggregateSeries } from '@overtally/dsp';
import { Readable } from 'node:stream';
import { problem } from '../../common/problem.js';
import { Storage } from '../../storage/storage.js';
import { AnalysesService } from '../analyses.service.js';
import { firstRow, placeOf } from './series-layout.js';
import { seriesTable } from './series-table.js';
import { readRow, storedSeries, unitOf, windowsPerInterval } from './stored-series.js';
import { thinnedSeries, type SeriesPoints } from './thinned-series.js';

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
      readRow(this.storage, stored, 'start', 0),
      readRow(this.storage, stored, 'flagged', 0),
      readRow(this.storage, stored, figure, row),
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

  /**
   * The harmonic group of one order from window to window (IEC 61000-4-7, 5.5.1), rms in the channel's unit; null where
   * it was not followed.
   */
  async groups(
    id: string,
    index: number,
    order: number,
  ): Promise<{ values: Float64Array; intervalS: number } | null> {
    const { series: shape, seriesKey: key } = await this.analyses.channel(id, index);
    if (shape === null || key === null || order < 1 || order > shape.orders) return null;
    const values = await readRow(this.storage, { key, shape }, 'group', order - 1);
    return { values, intervalS: shape.intervalS };
  }

  /** A figure with all its orders over time as CSV; errors as for `figure`. */
  async table(id: string, { channel: index, figure, aggregation }: SeriesTableQuery): Promise<Readable> {
    const channel = await this.analyses.channel(id, index);
    const stored = storedSeries(channel);
    if (placeOf(stored.shape, figure).rows === 0)
      throw problem(404, 'no-such-order', absence(figure, 0, 0, 0));
    const factor = windowsPerInterval(aggregation, channel, stored.shape);
    const rows = seriesTable(this.storage, stored, { figure, factor, unit: unitOf(figure, channel.unit) });
    return Readable.from(rows);
  }
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

function aggregated(points: SeriesPoints & { flagged: ArrayLike<number> }, factor: number): SeriesPoints {
  if (factor === 1) return points;
  const { values, flagged } = aggregateSeries(points.value, points.flagged, factor);
  const timeS = Float64Array.from(values, (_, i) => points.timeS[i * factor]!);
  return { timeS, value: values, flagged };
}
