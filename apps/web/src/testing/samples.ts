import {
  ownAccountSchema,
  limitSetSchema,
  memberSchema,
  projectSchema,
  recordingSchema,
  userSchema,
  type OwnAccount,
  type LimitSet,
  type Member,
  type Project,
  type Recording,
  type User,
} from '@overtally/contracts';

/** A readable, valid id: the number stands in its last digits. */
export const sampleId = (number: number) => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;

const moment = '2026-11-26T13:20:00Z';

/** Samples go through the schemas of the contracts, so that they cannot drift from them. */
export const sampleAccount = (change: Partial<OwnAccount> = {}): OwnAccount =>
  ownAccountSchema.parse({
    id: sampleId(1),
    email: 'mara.lind@halden.example',
    name: 'Mara Lind',
    isAdministrator: false,
    worksInLaboratory: true,
    ...change,
  });

export const sampleProject = (change: Partial<Project> = {}): Project =>
  projectSchema.parse({
    id: sampleId(10),
    name: 'Halden kiln and lighting, 2026',
    customer: 'Halden Ceramics',
    customerContact: '',
    preparerMayIssue: false,
    description: '',
    defaultSettings: { profile: 'mains', nominalFrequencyHz: 'auto' },
    comparisonLimitSetId: null,
    archivedAt: null,
    createdAt: moment,
    role: 'manager',
    counts: { recordings: 148, members: 2, reports: 3 },
    ...change,
  });

export const sampleMember = (change: Partial<Member> = {}): Member =>
  memberSchema.parse({
    userId: sampleId(1),
    name: 'Mara Lind',
    email: 'mara.lind@halden.example',
    role: 'manager',
    addedAt: moment,
    ...change,
  });

export const sampleUser = (change: Partial<User> = {}): User =>
  userSchema.parse({ ...sampleAccount(), disabledAt: null, createdAt: moment, ...change });

export const sampleLimitSet = (change: Partial<LimitSet> = {}): LimitSet =>
  limitSetSchema.parse({
    id: sampleId(30),
    projectId: null,
    version: 1,
    title: 'House limits',
    standard: '',
    edition: 'rev. 2',
    tableRef: '',
    appliesWhen: '',
    quantity: 'current',
    unit: 'A',
    basis: 'absolute',
    referenceParameter: null,
    procedure: 'plain',
    parameters: [],
    orders: [{ order: 3, limit: 2.3 }],
    totals: [],
    source: ['House rule 12'],
    confidence: 'high',
    evidence: '',
    notes: [],
    ...change,
  });

export const sampleRecording = (change: Partial<Recording> = {}): Recording =>
  recordingSchema.parse({
    ...{ id: sampleId(147), projectId: sampleId(10), number: 'R-0147', name: 'Bench dimmer' },
    ...{ eut: 'DM-4', measuringChain: '', instrument: '', capturedAt: moment, remark: '' },
    ...{ equipment: null, operatingMode: null, chain: null, conditions: {} },
    ...{ status: 'ready', progress: 1, problem: null, warnings: [], duplicateOf: null },
    file: { name: 'dimmer.csv', size: 1000, sha256: '9f3c1ad0'.padEnd(64, '0') },
    ...{
      format: 'csv',
      metadata: {},
      import: {},
      readingRule: null,
      sampleRateHz: 10_000,
      sampleCount: 20_000,
      durationS: 2,
    },
    channels: [{ index: 0, name: 'i', quantity: 'current', unit: 'A', gain: 1, offset: 0, chain: null }],
    ...{ latestAnalysisId: sampleId(500), summaries: [], createdAt: moment },
    uploadedBy: { id: sampleId(1), name: 'Mara Lind' },
    ...change,
  });
