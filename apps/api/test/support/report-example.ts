import type { ChannelAnalysis, Note, Report, ReportSection, Verdict } from '@overtally/contracts';
import { evaluate, findPublishedLimitSet, measurementOfChannel } from '@overtally/limits';
import { createHash } from 'node:crypto';

/** A UUID that is the same for the same words. */
export function idFor(words: string): string {
  const hex = createHash('sha256').update(words).digest('hex');
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-4${hex.slice(13, 16)}-8${hex.slice(17, 20)}-${hex.slice(20, 32)}`;
}

const person = { id: idFor('analyst'), name: 'Ines Halden' };

/**
 * rms of order h of a resistive load behind a phase-cut dimmer, firing at `alpha`.
 * Fourier integral of sqrt(2) I sin(t) over (alpha, pi), closed form.
 */
export function phaseCutRms(order: number, fullRms: number, alpha: number): number {
  if (order % 2 === 0) return 0;
  const scale = fullRms / Math.PI;
  if (order === 1) {
    return scale * Math.hypot((Math.cos(2 * alpha) - 1) / 2, Math.PI - alpha + Math.sin(2 * alpha) / 2);
  }
  const up = order + 1;
  const down = order - 1;
  const cosine = (Math.cos(up * alpha) - 1) / up - (Math.cos(down * alpha) - 1) / down;
  const sine = Math.sin(up * alpha) / up - Math.sin(down * alpha) / down;
  return scale * Math.hypot(cosine, sine);
}

/** Analysis of one channel whose orders have the given rms values, index 0 being order 1. */
export function channelWith(rms: readonly number[], given: Partial<ChannelAnalysis> = {}): ChannelAnalysis {
  const first = rms[0]!;
  const distortion = Math.hypot(...rms.slice(1, 40));
  return {
    index: 0,
    name: 'Supply current',
    quantity: 'current',
    unit: 'A',
    mean: 0.0021,
    rms: Math.hypot(...rms),
    peak: 5.31,
    crestFactor: 2.11,
    formFactor: 1.571,
    fundamental: { frequencyHz: 49.981, rms: first, phaseDeg: -122.3, frequencyUncertaintyHz: 0.0002 },
    thdFPercent: (100 * distortion) / first,
    thdRPercent: (100 * distortion) / Math.hypot(...rms.slice(0, 40)),
    thdMaxOrder: 40,
    thdPlusNPercent: null,
    sinadDb: null,
    snrDb: null,
    sfdrDb: null,
    enobBits: null,
    tone: null,
    distortion: null,
    bands: [],
    countedFrequency: [],
    lines: [],
    families: [],
    uncertainty: {},
    harmonics: rms.map((value, index) => ({
      order: index + 1,
      frequencyHz: 49.981 * (index + 1),
      rms: value,
      percentOfFundamental: (100 * value) / first,
      phaseDeg: null,
      phaseZeroCrossingDeg: null,
      groupRms: value,
      subgroupRms: value,
      smoothedMeanRms: value,
      smoothedMaxRms: value * 1.01,
      uncertainty: null,
      groupStatistics: null,
      subgroupStatistics: null,
    })),
    interharmonics: [],
    windows: {
      ...{ cycles: 10, count: 150, samplesPerWindow: 10004 },
      ...{ flaggedCount: 0, synchronisationErrorPercent: 0.001, gridChannel: 0 },
    },
    flags: [],
    ...given,
  };
}

/** The bench dimmer at 90 degrees: orders 1 to 50. */
export const dimmerChannel = (given: Partial<ChannelAnalysis> = {}): ChannelAnalysis =>
  channelWith(
    Array.from({ length: 50 }, (_, index) => phaseCutRms(index + 1, 3.74, Math.PI / 2)),
    given,
  );

export interface SectionOptions {
  number?: string;
  name?: string;
  channel?: ChannelAnalysis;
  limitSetId?: string;
  parameters?: Verdict['parameters'];
  decisionRule?: Verdict['decisionRule'];
  notes?: Note[];
}

export const noteOn = (order: number, text: string, cause = ''): Note => ({
  id: idFor(`note ${order} ${text}`),
  analysisId: idFor('analysis'),
  channel: 0,
  target: { kind: 'order', order },
  text,
  cause,
  author: person,
  createdAt: '2026-11-27T09:12:00.000Z',
  updatedAt: '2026-11-27T09:12:00.000Z',
});

/** One judged recording, with the verdict that the limits package gives it. */
export function exampleSection(options: SectionOptions = {}): ReportSection {
  const { number = 'R-0147', name = 'Bench dimmer, 40 % setting', channel = dimmerChannel() } = options;
  const limitSet = findPublishedLimitSet(options.limitSetId ?? 'iec61000-3-2.classA')!;
  const parameters = options.parameters ?? {};
  const decisionRule = options.decisionRule ?? 'simple-acceptance';
  const recordingId = idFor(`recording ${number}`);
  const analysisId = idFor(`analysis ${number}`);
  return {
    verdict: {
      id: idFor(`verdict ${number}`),
      analysisId,
      recordingId,
      channel: channel.index,
      channelName: channel.name,
      unit: channel.unit,
      limitSetId: limitSet.id,
      limitSet,
      parameters,
      decisionRule,
      ...evaluate(limitSet, measurementOfChannel(channel), { parameters, decisionRule }),
      supply: null,
      repeats: [],
      repeatability: null,
      author: person,
      createdAt: '2026-11-27T10:02:00.000Z',
    },
    recording: {
      id: recordingId,
      number,
      name,
      eut: 'DM-4 dimmer, no. 0031',
      measuringChain: 'CT-07 + front end 2',
      instrument: 'Recorder 16 bit, no. 118, calibrated 3 Feb 2026',
      capturedAt: '2026-11-26T14:20:31.000Z',
      file: {
        name: 'dimmer-40.csv',
        size: 31_457_280,
        sha256: createHash('sha256').update(number).digest('hex'),
      },
      sampleRateHz: 50_000,
      sampleCount: 1_500_000,
      durationS: 30,
      metadata: { Operator: 'T. Moe' },
      import: { decimal: ',', delimiter: ';', channels: [{ column: 1, gain: 10, unit: 'A' }] },
    },
    analysis: {
      id: analysisId,
      engineVersion: '1.0.0',
      finishedAt: '2026-11-26T14:31:02.000Z',
      settings: { profile: 'mains', nominalFrequencyHz: 50, maxOrder: 50 },
      channel,
    },
    notes: options.notes ?? [],
    equipment: null,
    operatingMode: null,
    chain: null,
    conditions: {},
    waveform: null,
    distortion: null,
  };
}

/** A report over the sections, as the API gives it. */
export function exampleReport(sections: ReportSection[], given: Partial<Report> = {}): Report {
  return {
    id: idFor('report'),
    projectId: idFor('project'),
    number: 'HR-0001',
    revision: 0,
    title: 'Harmonic current of dimmer DM-4',
    summary: 'Dimmer DM-4 was measured at three settings on a 230 V, 50 Hz supply.',
    deviations: '',
    recipients: [],
    replaces: null,
    replacedBy: null,
    overdueReason: null,
    revisionReason: null,
    returned: null,
    cautions: [],
    submittedBy: person,
    isIssuedByPreparer: false,
    status: 'issued',
    verdictIds: sections.map((section) => section.verdict.id),
    studyVersionIds: [],
    content: {
      project: {
        id: idFor('project'),
        name: 'Halden kiln and lighting, 2026',
        customer: 'Halden Lighting AS',
        customerContact: 'Kanalgata 4, Halden',
        preparerMayIssue: false,
      },
      revisionReason: null,
      laboratory: { name: '', address: '', contact: '', accreditation: '' },
      sections,
      studies: [],
      result: sections[0]!.verdict.result,
    },
    events: [],
    preparedBy: person,
    issuedBy: { id: idFor('manager'), name: 'Maren Lund' },
    issuedAt: '2026-11-28T08:00:00.000Z',
    pdfSha256: null,
    jsonSha256: null,
    csvSha256: null,
    checkCode: null,
    checkUrl: null,
    createdAt: '2026-11-27T10:05:00.000Z',
    updatedAt: '2026-11-27T11:05:00.000Z',
    ...given,
  };
}
