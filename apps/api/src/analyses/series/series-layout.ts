import type { SeriesFigure } from '@overtally/contracts';
import type { schema } from '@overtally/db';

/** What a stored series holds beside the figures that can be asked for. */
export type StoredFigure = SeriesFigure | 'start' | 'flagged';

/** Where the rows of a figure begin in the stored array, and how many there are; each row holds a value a window. */
export interface FigurePlace {
  figure: StoredFigure;
  offset: number;
  rows: number;
}

/**
 * Order of the figures in the one-dimensional array in which the series of a channel are stored: figure after figure,
 * row after row. Changing it would make stored series unreadable.
 */
export function seriesLayout(shape: schema.StoredSeries): FigurePlace[] {
  const rows: [StoredFigure, number][] = [
    ['start', 1],
    ['flagged', 1],
    ['frequency', 1],
    ['rms', 1],
    ['thd', 1],
    ['thdg', 1],
    ['thds', 1],
    ['pwhd', 1],
    ['line', shape.orders],
    ['group', shape.orders],
    ['subgroup', shape.orders],
    ['interharmonicGroup', shape.interharmonics],
    ['centredSubgroup', shape.interharmonics],
    ['band', shape.bandCentresHz.length],
  ];
  let offset = 0;
  return rows.map(([figure, count]) => {
    const place = { figure, offset, rows: count };
    offset += count * shape.count;
    return place;
  });
}

/** The place of one figure. */
export function placeOf(shape: schema.StoredSeries, figure: StoredFigure): FigurePlace {
  return seriesLayout(shape).find((place) => place.figure === figure)!;
}

/** Number of the first row of a figure as people count: order 1, the gap above order 0, the band 0. */
export const firstRow: Record<SeriesFigure, number | null> = {
  frequency: null,
  rms: null,
  thd: null,
  thdg: null,
  thds: null,
  pwhd: null,
  line: 1,
  group: 1,
  subgroup: 1,
  interharmonicGroup: 0,
  centredSubgroup: 0,
  band: 0,
};
