/** Physical quantity of a channel. */
export type Quantity =
  | 'voltage'
  | 'current'
  | 'power'
  | 'sound_pressure'
  | 'acceleration'
  | 'velocity'
  | 'dimensionless'
  | 'other';

export type RecordFormat = 'csv' | 'wav' | 'npy' | 'comtrade';
export type Delimiter = ',' | ';' | '\t' | ' ' | '|';
export type DecimalMark = '.' | ',';
export type TimeUnit = 's' | 'ms' | 'us' | 'ns';

/** One channel as the user wants it read; `column` is a 0-based index or the name in the header. */
export interface ChannelOptions {
  column: number | string;
  name?: string;
  quantity?: Quantity;
  unit?: string;
  /** In place of the gain that the file states, else of 1. */
  gain?: number;
  /** In `unit`, added last; no factor applies to it. In place of the offset that the file states. */
  offset?: number;
  /**
   * Input in `unit` where the raw value is 1; multiplies the gain. The raw value of an integer WAV is
   * code / 2^(bits - 1), so this is the input at digital full scale.
   */
  fullScale?: number;
  /** 100 for a probe or transformer of 100:1; multiplies the gain. */
  probeRatio?: number;
  /** Turns the sign of the gain. The ends of the codes stay raw: with a negative gain the highest code is the lowest value. */
  inverted?: boolean;
}

/** What the user states about a file; everything absent is detected from its content. */
export interface ImportOptions {
  sampleRateHz?: number;
  delimiter?: Delimiter;
  decimal?: DecimalMark;
  /** Lines before the first data row, whatever they hold. */
  headerRows?: number;
  /** Index or name of the time column; null: the file has none. */
  timeColumn?: number | string | null;
  timeUnit?: TimeUnit;
  channels?: ChannelOptions[];
  /**
   * Samples without a number: kept as missing (default), bridged by a straight line in runs of up to ten (at the ends by
   * the nearest number; longer runs stay missing), or the file refused.
   */
  missingValues?: 'keep' | 'interpolate' | 'refuse';
  /**
   * Time stamps off by more than 5 % of their interval: resampled at the mean rate (default; see `readRecording`), taken
   * as even at that rate, or the file refused. A sample rate that is given rules over the stamps.
   */
  unevenTime?: 'resample' | 'take-as-even' | 'refuse';
}

/**
 * A channel of the file. Engineering value = raw value x `gain` + `offset`, in `unit`. The gain holds the prefix of the
 * unit, full scale, probe ratio and inversion, so it may be negative.
 */
export interface ReadChannel {
  index: number;
  /** 0-based source column, or 0-based channel of a file without columns. */
  column: number;
  name: string;
  quantity: Quantity;
  unit: string;
  gain: number;
  offset: number;
  /** Raw value of the lowest code of an integer format, else null. */
  lowestCode: number | null;
  /** Raw value of the highest code of an integer format, else null. */
  highestCode: number | null;
}

/** Receives the samples while the file is read. */
export interface SampleSink {
  /** Called once the channels are known; called again where a file is read twice: what was written before is void then. */
  begin(channels: ReadChannel[]): void | Promise<void>;
  /**
   * Raw values as they stand in the file (integer WAV: code / 2^(bits-1); .npy and COMTRADE: the stored number), before gain and offset; NaN where a
   * value is missing. Uneven time stamps are resampled and missing values bridged among the raw values. The buffer is used again once the returned promise resolves.
   */
  write(channelIndex: number, samples: Float64Array): void | Promise<void>;
}

/** Why a file was not read, where, and what helps. Lines and columns count from 1. */
export interface Problem {
  code: string;
  message: string;
  cure: string;
  line?: number;
  column?: number;
}

/** Something the reader noticed and dealt with. */
export interface ReadWarning {
  code: 'missing-values' | 'uneven-sampling' | 'duplicate-rows' | 'truncated' | 'partial-row' | (string & {});
  message: string;
  count?: number;
  firstLine?: number;
  /** The first samples it happened before, at most 20, counted from 0. */
  samples?: number[];
  /** The largest figure that was compared, with what, and their unit. */
  value?: number;
  limit?: number;
  unit?: string;
}

/** A column as the file names it; `unit` is the unit as written, prefix included. */
export interface LayoutColumn {
  index: number;
  name: string;
  unit: string;
  quantity: Quantity;
  /** Scaling that the file states, in `unit`; absent where it states none. */
  gain?: number;
  offset?: number;
}

/** Raw ends of an integer sample format. */
export interface CodeRange {
  lowest: number;
  highest: number;
}

/** How the reader understood the file. */
export interface DetectedLayout {
  format: RecordFormat;
  encoding?: string;
  delimiter?: string;
  decimal?: string;
  headerRows?: number;
  /** 1-based line of the units row, null when there is none. */
  unitsRow?: number | null;
  /** 0-based index of the time column, null when there is none. */
  timeColumn?: number | null;
  timeUnit?: string | null;
  columns?: LayoutColumn[];
  bitsPerSample?: number;
  sampleFormat?: string;
  confident: boolean;
  /** What a person should look at, in plain sentences. */
  doubts: string[];
}

/** A recording that was read to its end. */
export interface ReadSuccess {
  ok: true;
  format: RecordFormat;
  sampleRateHz: number;
  /** Samples per channel, missing ones included. */
  sampleCount: number;
  channels: ReadChannel[];
  /** Missing values per channel, in the order of `channels`. */
  missingValues: number[];
  /** First time stamp in seconds (0 for calendar stamps, whose text is in the metadata); null without a time column. */
  startTimeS: number | null;
  warnings: ReadWarning[];
  metadata: Record<string, string>;
  layout: DetectedLayout;
}

export type ReadOutcome = ReadSuccess | { ok: false; problem: Problem };

/** Bytes of a file, or what opens them anew each time it is called. */
export type RecordingSource =
  AsyncIterable<Uint8Array> | (() => AsyncIterable<Uint8Array> | Promise<AsyncIterable<Uint8Array>>);

export interface ReadArguments {
  fileName: string;
  sizeBytes?: number;
  options?: ImportOptions;
  sink: SampleSink;
  onProgress?: (bytesRead: number) => void;
  signal?: AbortSignal;
}

export interface PreviewArguments {
  fileName: string;
  sizeBytes?: number;
  options?: ImportOptions;
}

/** The beginning of a channel as it would be read: scaled, missing values and uneven time stamps treated by the options. */
export interface PreviewSignal {
  /** As in `ReadChannel`. */
  column: number;
  name: string;
  quantity: Quantity;
  unit: string;
  /** Time of the first value in seconds, by the time column where there is one, else 0. */
  startS: number;
  /** Time between values in seconds. */
  stepS: number;
  /**
   * At most 2000 values in `unit`, null where one is missing: successive samples where that many reach over 0.08 s (four
   * cycles at 50 Hz), else lowest and highest value of equal bins in the order they occur, so that no peak is lost.
   */
  values: (number | null)[];
}

/** All samples of a channel that the bytes at hand hold, scaled, at the sample rate of the preview; NaN: missing. */
export interface HeadSamples extends Pick<PreviewSignal, 'column' | 'name' | 'quantity' | 'unit'> {
  samples: Float64Array;
}

/** What the beginning of a file tells about it. */
export interface PreviewOutcome {
  layout: DetectedLayout;
  /** The first lines as they stand in the file; the first has number 1. Empty for binary formats. */
  lines: string[];
  /** The first data rows, cell by cell: number, text, or null where the cell is blank. */
  rows: (string | number | null)[][];
  sampleRateHz: number | null;
  problem: Problem | null;
  /** Names of the import options the user must give, such as `sampleRateHz`. */
  needs: string[];
  /** Columns that tell the time and are no channels: the time column and clocks beside it. */
  clockColumns: number[];
  /** The first eight channels that would be read; empty where a problem stands in the way. */
  signals: PreviewSignal[];
  /** The same channels at full rate, for figures such as rms and fundamental. */
  headSamples: HeadSamples[];
}
