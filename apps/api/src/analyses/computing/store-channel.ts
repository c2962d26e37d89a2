import type { ChannelAnalysis, Quantity } from '@overtally/contracts';
import type { schema } from '@overtally/db';
import type { ChannelAnalysis as EngineChannel } from '@overtally/dsp';
import { putNpy } from '../../storage/npy.js';
import type { Storage } from '../../storage/storage.js';
import { putSeries } from '../series/put-series.js';

/** Where the long arrays of a channel lie, and what they hold. */
export interface StoredArrays {
  spectrumKey: string;
  spectrumWindow: string;
  spectrumStartHz: number;
  spectrumStepHz: number;
  spectrumNoiseBandwidthHz: number;
  spectrumSegments: number;
  seriesKey: string | null;
  series: schema.StoredSeries | null;
}

/** Stores the spectrum and the series of a channel under `prefix`; what remains are figures for the database. */
export async function storeChannel(
  storage: Storage,
  prefix: string,
  channel: EngineChannel,
): Promise<ChannelAnalysis & StoredArrays> {
  const { spectrum, series, ...figures } = channel;
  const spectrumKey = `${prefix}/spectrum-${channel.index}.npy`;
  await putNpy(storage, spectrumKey, spectrum.rms);
  const seriesKey = series && `${prefix}/series-${channel.index}.npy`;
  return {
    ...figures,
    quantity: channel.quantity as Quantity,
    interharmonics: channel.interharmonics.flatMap(({ betweenOrders, groupRms, centredSubgroupRms }) =>
      groupRms === null || centredSubgroupRms === null
        ? []
        : [{ betweenOrders, groupRms, centredSubgroupRms }],
    ),
    spectrumKey,
    spectrumWindow: spectrum.window,
    spectrumStartHz: spectrum.startHz,
    spectrumStepHz: spectrum.stepHz,
    spectrumNoiseBandwidthHz: spectrum.noiseBandwidthHz,
    spectrumSegments: spectrum.segments,
    seriesKey,
    series: series && seriesKey ? await putSeries(storage, seriesKey, series) : null,
  };
}
