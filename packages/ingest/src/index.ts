export { joinComtradePair } from './comtrade/pair.js';
export { decodeNpyHeader, encodeNpyHeader } from './npy-header.js';
export { previewRecording } from './preview-recording.js';
export { readRecording } from './read-recording.js';
export type {
  ChannelOptions,
  DecimalMark,
  Delimiter,
  DetectedLayout,
  HeadSamples,
  ImportOptions,
  LayoutColumn,
  PreviewArguments,
  PreviewOutcome,
  PreviewSignal,
  Problem,
  Quantity,
  ReadArguments,
  ReadChannel,
  ReadOutcome,
  ReadSuccess,
  ReadWarning,
  RecordFormat,
  RecordingSource,
  SampleSink,
  TimeUnit,
} from './types.js';
