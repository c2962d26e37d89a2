import type { schema } from '@overtally/db';
import type { WindowSeries } from '@overtally/dsp';
import { encodeNpyHeader } from '@overtally/ingest';
import { Readable } from 'node:stream';
import { asBytes } from '../../storage/npy.js';
import type { Storage } from '../../storage/storage.js';
import { seriesLayout, type StoredFigure } from './series-layout.js';

/** Stores the series of a channel as one array in the order of `seriesLayout`, and says what it holds. */
export async function putSeries(
  storage: Storage,
  key: string,
  series: WindowSeries,
): Promise<schema.StoredSeries> {
  const { count, intervalS, orders } = series;
  const shape: schema.StoredSeries = {
    ...{ count, intervalS, orders },
    interharmonics: count === 0 ? 0 : series.interharmonicGroup.length / count,
    bandCentresHz: [...series.bandCentresHz],
  };
  const values = valuesOf(series);
  const places = seriesLayout(shape);
  const length = places.reduce((sum, { rows }) => sum + rows * count, 0);
  const pieces = places.map(({ figure }) => asBytes(values[figure]));
  await storage.put(key, Readable.from([encodeNpyHeader(length), ...pieces]));
  return shape;
}

function valuesOf(series: WindowSeries): Record<StoredFigure, Float64Array> {
  return {
    start: series.startS,
    flagged: Float64Array.from(series.flagged),
    frequency: series.frequencyHz,
    rms: series.rms,
    thd: series.thd,
    thdg: series.thdg,
    thds: series.thds,
    pwhd: series.pwhd,
    line: series.line,
    group: series.group,
    subgroup: series.subgroup,
    interharmonicGroup: series.interharmonicGroup,
    centredSubgroup: series.centredSubgroup,
    band: series.band,
  };
}
