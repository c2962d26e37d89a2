import {
  reportSchema,
  verdictSchema,
  type Report,
  type ReportStatus,
  type Verdict,
} from '@overtally/contracts';
import { sampleChannel } from './sample-analyses.js';
import { sampleId, sampleLimitSet, sampleProject, sampleRecording } from './samples.js';

const moment = '2026-11-27T09:00:00Z';
const analyst = { id: sampleId(2), name: 'Ada Berg' };

export const sampleVerdict = (change: Partial<Verdict> = {}): Verdict =>
  verdictSchema.parse({
    ...{ id: sampleId(700), analysisId: sampleId(500), recordingId: sampleId(147), channel: 0 },
    ...{ channelName: 'i', unit: 'A', limitSetId: sampleId(30), limitSet: sampleLimitSet(), parameters: {} },
    decisionRule: 'simple-acceptance',
    decisionRuleText: 'Simple acceptance.',
    result: 'fail',
    reason: 'Over at 3',
    orders: [
      {
        ...{ order: 3, mean: 2.4, smoothedMax: 2.4, uncertainty: null, limit: 2.3, margin: -0.1 },
        ...{ sharePercent: 104.3, result: 'fail', reason: 'Mean above the limit' },
      },
    ],
    totals: [],
    supply: null,
    repeats: [],
    repeatability: null,
    author: analyst,
    createdAt: moment,
    ...change,
  });

export function sampleReport(status: ReportStatus, change: Partial<Report> = {}): Report {
  const isIssued = status === 'issued';
  const verdict = sampleVerdict();
  return reportSchema.parse({
    ...{ id: sampleId(800), projectId: sampleProject().id, revision: 0, title: 'Dimmer, type test', status },
    ...{
      summary: 'Over at order 3.',
      number: isIssued ? 'HR-0001' : null,
      verdictIds: [verdict.id],
      studyVersionIds: [],
    },
    content: {
      project: sampleProject(),
      revisionReason: null,
      laboratory: { name: 'Brackwater bench', address: '', contact: '', accreditation: '' },
      studies: [],
      sections: [
        {
          verdict,
          recording: sampleRecording(),
          analysis: {
            ...{ id: sampleId(500), engineVersion: '0.1.0', finishedAt: moment },
            settings: { profile: 'mains', nominalFrequencyHz: 50 },
            channel: sampleChannel(),
          },
          notes: [],
          ...{
            equipment: null,
            operatingMode: null,
            chain: null,
            conditions: {},
            waveform: null,
            distortion: null,
          },
        },
      ],
      result: 'fail',
    },
    events: [{ kind: 'created', by: analyst, at: moment, comment: '' }],
    ...{ deviations: '', recipients: [], replaces: null, replacedBy: null, overdueReason: null },
    ...{ revisionReason: null, returned: null, cautions: [], submittedBy: null, isIssuedByPreparer: false },
    ...{ jsonSha256: null, csvSha256: null, checkCode: null, checkUrl: null },
    ...{ preparedBy: analyst, issuedBy: isIssued ? analyst : null, issuedAt: isIssued ? moment : null },
    pdfSha256: isIssued ? 'ab'.repeat(32) : null,
    ...{ createdAt: moment, updatedAt: moment },
    ...change,
  });
}
