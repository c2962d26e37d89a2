import { createContext, useContext } from 'react';
import type { ChartBand } from '../../../components/charts/curve-chart.js';

/** What the charts show of the spread of the values; null where none was computed or the stages changed since. */
export interface SpreadBand {
  /** In dB over Hz. */
  response: ChartBand;
  orders: readonly { order: number; min: number; max: number }[];
}

export const SpreadContext = createContext<SpreadBand | null>(null);

export const useSpreadBand = (): SpreadBand | null => useContext(SpreadContext);
