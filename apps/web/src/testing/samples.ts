import {
  accountSchema,
  limitSetSchema,
  memberSchema,
  projectSchema,
  userSchema,
  type Account,
  type LimitSet,
  type Member,
  type Project,
  type User,
} from '@overtally/contracts';

/** A readable, valid id: the number stands in its last digits. */
export const sampleId = (number: number) => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;

const moment = '2026-11-26T13:20:00Z';

/** Samples go through the schemas of the contracts, so that they cannot drift from them. */
export const sampleAccount = (change: Partial<Account> = {}): Account =>
  accountSchema.parse({
    id: sampleId(1),
    email: 'mara.lind@halden.example',
    name: 'Mara Lind',
    isAdministrator: false,
    ...change,
  });

export const sampleProject = (change: Partial<Project> = {}): Project =>
  projectSchema.parse({
    id: sampleId(10),
    name: 'Halden kiln and lighting, 2026',
    customer: 'Halden Ceramics',
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
