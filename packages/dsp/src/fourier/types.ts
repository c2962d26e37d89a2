/** One order of a Fourier series: √2 rms cos(2π order f0 t + phase). */
export interface SeriesComponent {
  order: number;
  rms: number;
  /** Cosine form, zero time = start of the cycle; null where it is not known. */
  phaseDeg: number | null;
}

/** A periodic signal by its Fourier series. */
export interface FourierSeries {
  frequencyHz: number;
  dc: number;
  /** Positive orders, each at most once, in any sequence. */
  components: readonly SeriesComponent[];
  /** rms of what the signal holds beside DC and these orders (noise, interharmonics), default 0. */
  restRms?: number;
}
