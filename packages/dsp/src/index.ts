export { analyseRecord } from './analyse-record.js';
export { analyseSource } from './analyse-source.js';
export { engineVersion } from './stages/record-stages.js';
export { DEFAULT_MAX_ORDER, DEFAULT_THD_ORDER } from './profiles/resolve-settings.js';
export { AnalysisInputError, AnalysisStopped } from './errors.js';
export type * from './types.js';
export type { AnalysisPart, AnalyseSourceOptions, PartResult, RunPart } from './parts/part-types.js';
export type { ReadSamples } from './parts/reading.js';
export { computePart } from './parts/run-part.js';
export type * from './power/types.js';
export { createComplexFftPlan, type ComplexFftPlan } from './fft/complex-fft-plan.js';
export { createRealFftPlan, type RealFftPlan } from './fft/real-fft-plan.js';
export { windowSamples, type WindowName } from './windows/window-samples.js';
export { windowFigures, type WindowFigures } from './windows/window-figures.js';
export {
  amplitudeCorrection,
  powerCorrection,
  windowGains,
  type WindowGains,
} from './windows/window-gains.js';
export {
  createWelch,
  welch,
  type PowerSpectrum,
  type WelchAverage,
  type WelchOptions,
} from './spectrum/welch.js';
export { amplitudeSpectrum, type SpectrumOptions } from './spectrum/amplitude-spectrum.js';
export {
  findFundamental,
  type FundamentalEstimate,
  type FundamentalOptions,
} from './fundamental/find-fundamental.js';
export { frequencyTrack, type FrequencyTrack } from './fundamental/frequency-track.js';
export { fitSinusoids, wrapDegrees, type FittedSinusoid, type SinusoidFit } from './model/fit-sinusoids.js';
export { fitHarmonics, type FittedHarmonic, type HarmonicFit } from './harmonics/fit-harmonics.js';
export { zeroCrossingPhase } from './harmonics/zero-crossing-phase.js';
export { synthesise, type SynthesisComponent } from './harmonics/synthesise.js';
export { crestFactor } from './figures/crest-factor.js';
export { currentShape, type CurrentShapeAngles, type CurrentShapeInput } from './figures/current-shape.js';
export { formFactor } from './figures/form-factor.js';
export { thdF, thdR } from './figures/distortion.js';
export { listPeaks, type PeakList, type PeakListOptions } from './peaks/list-peaks.js';
export { combineToneFigures, toneFigures } from './tone/tone-figures.js';
export { sineFit3, sineFit4, type SineFit } from './tone/sine-fit.js';
export { longestToneStretch } from './tone/combine-tone-powers.js';
export type { FrequencyBand, Spur, ToneOptions, TonePowers, ToneResult } from './tone/tone-result.js';
export { waveformFigures, type WaveformFigures } from './figures/waveform-figures.js';
export { windowBoundaries } from './groups/window-boundaries.js';
export {
  centredSubgroups,
  harmonicGroups,
  harmonicSubgroups,
  interharmonicGroups,
} from './groups/grouping.js';
export { createWindowLines, lineRms, type WindowLinePlan } from './groups/window-lines.js';
export {
  aggregateSeries,
  WINDOWS_PER_10_MIN,
  WINDOWS_PER_3_S,
  type AggregatedSeries,
} from './groups/aggregate-series.js';
export { weightedDistortion } from './groups/weighted-distortion.js';
export { statistics } from './figures/statistics.js';
export { smooth, smoothingAlpha } from './groups/smooth.js';
export { fitPhasorSet } from './power/fit-phasor-set.js';
export { powerFigures } from './power/power-figures.js';
export { orderPowers } from './power/order-powers.js';
export { threePhaseFigures, type ThreePhaseResults } from './power/three-phase-figures.js';
export { symmetricalComponents, unbalance } from './power/symmetrical-components.js';
export { transformerFactors, type TransformerOptions } from './power/transformer-factors.js';
export { recordPower, type PowerChannel, type RecordPowerInput } from './power/record-power.js';
export {
  proposePowerPairs,
  type DescribedChannel,
  type PowerProposal,
  type ProposedThreePhaseSet,
} from './power/propose-power-pairs.js';
export { createFlagScan, type FlagScan, type FlagScanOptions, type ScanFindings } from './flags/flag-scan.js';
export { badRanges } from './flags/bad-ranges.js';
export { type SampleRange } from './flags/bounded-ranges.js';
export { qualityFlags, type FlagContext } from './flags/quality-flags.js';
export { type WindowSynchronism } from './flags/not-synchronous.js';
export { countedFrequency } from './fundamental/counted-frequency.js';
export type { FourierSeries, SeriesComponent } from './fourier/types.js';
export { textbookSeries, type TextbookShape, type TextbookWave } from './fourier/textbook-series.js';
export { oneCycle, partialSum } from './fourier/partial-sum.js';
export {
  ordersForResidual,
  residualRmsByOrder,
  type OrdersForResidual,
  type ResidualByOrder,
} from './fourier/residual-by-order.js';
export { waveformOf, undrawnOrders, type Waveform, type WaveformOptions } from './fourier/waveform.js';
export { seriesFigures, type SeriesFigures } from './fourier/series-figures.js';
export { checkSeries } from './fourier/check-series.js';
export { harmonicTable, type HarmonicRow } from './fourier/harmonic-table.js';
export {
  dcGain,
  poles,
  transferFunction,
  zeros,
  type TransferFunction,
} from './transfer/transfer-function.js';
export { closeLoop, type LoopOutput } from './transfer/close-loop.js';
export { relativeDegree, type Response, type StabilityVerdict } from './transfer/transfer-function.js';
export { fromZerosPolesGain, zerosPolesGain, type ZerosPolesGain } from './transfer/zeros-poles-gain.js';
export { inSeries, MAX_PADE_ORDER, padeDelay, withPadeDelay } from './transfer/compose.js';
export { expandRoots, polynomialRoots, type Root } from './transfer/polynomial-roots.js';
export {
  frequencyResponse,
  responseOf,
  totalDelay,
  type ResponsePoint,
  type StageChain,
} from './transfer/frequency-response.js';
export { stability, type Stability } from './transfer/stability.js';
export { steadyStateOf, type SteadyState } from './transfer/steady-state.js';
export { logFrequencies, resonancePeaks, type ResonancePeak } from './transfer/resonance.js';
export {
  harmonicsThroughStages,
  type OrderThroughStages,
  type StagesResult,
  type ThroughStagesOptions,
} from './response/through-stages.js';
export {
  resonanceWarnings,
  type ResonanceWarning,
  type ResonanceWarningOptions,
} from './response/resonance-warnings.js';
export { parseQuantity, type ComponentUnit } from './circuits/parse-quantity.js';
export type { CircuitKind, CircuitParameter, CircuitValues } from './circuits/circuit-kind.js';
export {
  chainOf,
  circuitKinds,
  isCircuitName,
  stageTransfer,
  type CircuitName,
  type StageSpec,
} from './circuits/stage-spec.js';
export { pidController, type ControllerSettings } from './circuits/controller.js';
export {
  supplyImpedance,
  transformerImpedance,
  type SeriesElements,
  type SupplyData,
  type TransformerData,
} from './circuits/network-data.js';
export { lineReactorInductance, type LineReactorRating } from './circuits/line-reactor.js';
export {
  designCTypeFilter,
  designTunedFilter,
  parallelResonanceOrder,
  type ShuntFilterComponents,
  type ShuntFilterDemand,
} from './circuits/filter-design.js';
export type { Complex } from './linear/complex.js';
export { hiddenModes, naturalModes, type HiddenMode, type NaturalMode } from './transfer/natural-modes.js';
export { groupDelay, unwrappedPhase } from './transfer/group-delay.js';
export {
  loopMargins,
  type GainCrossing,
  type LoopMargins,
  type PhaseCrossing,
} from './transfer/loop-margins.js';
export { closedLoopResponse, nyquist, type NyquistResult } from './transfer/nyquist.js';
export {
  partialFractions,
  type PartialFraction,
  type PartialFractions,
} from './transfer/partial-fractions.js';
export type { ExponentialTerm } from './transfer/exponential-sum.js';
export {
  stepFigures,
  timeResponse,
  type StepFigures,
  type TestInput,
  type TimeResponse,
} from './transfer/time-response.js';
export { periodicTransient, type PeriodicTransient } from './transfer/periodic-transient.js';
export type { ComponentSpread, Figures } from './tolerance/spread.js';
export {
  cornerStudy,
  MAX_CORNER_COMPONENTS,
  type CornerRange,
  type CornerResult,
} from './tolerance/corners.js';
export {
  drawStudy,
  MAX_DRAWS,
  type DrawOptions,
  type DrawRange,
  type DrawResult,
} from './tolerance/draws.js';
export {
  spreadsOf,
  stageFigures,
  withValues,
  type StageSpread,
  type StageValue,
} from './tolerance/stage-figures.js';
export { marginToLimits, worstOrder, type WorstOrder } from './tolerance/worst-order.js';
export { seededSource, type RandomSource } from './tolerance/xoshiro.js';
export { smallestMeeting, type GoalSeekOptions, type GoalSeekResult } from './search/smallest-meeting.js';
export {
  calibratedResponse,
  type CalibratedResponse,
  type CalibrationRow,
  type ChainResponse,
} from './measuring-chain/calibration-table.js';
export {
  measuringChainResponse,
  type MeasuringStage,
  type StageUncertainty,
} from './measuring-chain/chain-response.js';
export {
  correctLines,
  type CorrectedLine,
  type CorrectionOptions,
  type RecordedLine,
} from './measuring-chain/correct-line.js';
export { twoLevelSeries, type TwoLevelWave } from './transfer/two-level-wave.js';
export { twoLevelSteadyState, type TwoLevelSteadyState } from './transfer/two-level-steady-state.js';
export { routhTable, type RouthElement, type RouthRow, type RouthTable } from './transfer/routh-table.js';
export {
  channelUncertainty,
  type ChannelUncertainty,
  type UncertaintyInput,
  type WindowsBehindFigures,
} from './uncertainty/channel-uncertainty.js';
export { toneUncertainty } from './uncertainty/tone-uncertainty.js';
export { combineUncertainty, type Contribution } from './uncertainty/combine.js';
export { roundToUncertainty, type RoundedFigure } from './uncertainty/round-to-uncertainty.js';
