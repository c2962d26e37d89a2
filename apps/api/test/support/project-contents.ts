import { studyDefinitionSchema, type LimitSet } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import { made } from './factories.js';

/** What rows of a project hang on: whose they are and where. */
export interface Owner {
  projectId: string;
  userId: string;
}

let lastNumber = 0;

/** A recording that was received and not read yet; no file lies in storage. */
export async function newRecording(database: Database, { projectId, userId }: Owner) {
  lastNumber += 1;
  const [row] = await database
    .insert(schema.recordings)
    .values({
      projectId,
      number: 100_000 + lastNumber,
      name: 'Input current',
      fileName: 'current.csv',
      fileSize: 12,
      fileSha256: '0'.repeat(64),
      sourceKey: `sources/${'0'.repeat(64)}`,
      uploadedById: userId,
    })
    .returning();
  return made(row);
}

/** A compressor with one operating mode. */
export async function newEquipment(database: Database, { projectId, userId }: Owner) {
  const [row] = await database
    .insert(schema.equipment)
    .values({ projectId, name: 'Compressor', createdById: userId })
    .returning();
  const equipment = made(row);
  const [mode] = await database
    .insert(schema.operatingModes)
    .values({ equipmentId: equipment.id, position: 0, name: 'Full load' })
    .returning();
  return { ...equipment, mode: made(mode) };
}

/** A reading rule that fits tables by their ending. */
export async function newReadingRule(database: Database, { projectId, userId }: Owner) {
  const name = `Rule ${randomUUID()}`;
  const [row] = await database
    .insert(schema.readingRules)
    .values({ projectId, name, fileNamePattern: '*.csv', options: {}, createdById: userId })
    .returning();
  return made(row);
}

/** A queued analysis. */
export async function newAnalysis(database: Database, recordingId: string, { userId }: Owner) {
  const settings = { profile: 'mains', nominalFrequencyHz: 50 } as const;
  const [row] = await database
    .insert(schema.analyses)
    .values({ recordingId, settings, startedById: userId })
    .returning();
  return made(row);
}

export async function newNote(database: Database, analysisId: string, { userId }: Owner) {
  const [row] = await database
    .insert(schema.notes)
    .values({ analysisId, channelIndex: 0, kind: 'order', order: 5, text: 'Six-pulse', authorId: userId })
    .returning();
  return made(row);
}

/** A verdict on channel 0, which is made where the analysis has none. */
export async function newVerdict(database: Database, analysisId: string, { userId }: Owner) {
  await database
    .insert(schema.analysisChannels)
    .values({
      ...{ analysisId, index: 0, name: 'i', quantity: 'current', unit: 'A', thdMaxOrder: 40 },
      ...{ spectrumKey: `analyses/${analysisId}/channel-0.npy`, spectrumWindow: 'hann' },
      ...{ spectrumStartHz: 0, spectrumStepHz: 1 },
    })
    .onConflictDoNothing();
  const [row] = await database
    .insert(schema.verdicts)
    .values({
      analysisId,
      channelIndex: 0,
      limitSetId: 'bench.fifth',
      limitSet: { ...limits, id: 'bench.fifth', projectId: null },
      parameters: {},
      decisionRule: 'simple-acceptance',
      decisionRuleText: 'Within the limit is a pass',
      result: 'pass',
      reason: 'Every order is within its limit',
      orders: [],
      totals: [],
      authorId: userId,
    })
    .returning();
  return made(row);
}

export async function newLimitSet(database: Database, { projectId, userId }: Owner) {
  const id = randomUUID();
  const [row] = await database
    .insert(schema.limitSets)
    .values({ id, familyId: id, projectId, definition: limits, createdById: userId })
    .returning();
  return made(row);
}

/** A draft that speaks of one verdict. */
export async function newReport(database: Database, verdictId: string, { projectId, userId }: Owner) {
  const [row] = await database
    .insert(schema.reports)
    .values({ projectId, title: 'Harmonic currents', preparedById: userId })
    .returning();
  const report = made(row);
  await database.insert(schema.reportVerdicts).values({ reportId: report.id, verdictId, position: 0 });
  return report;
}

const limits: Omit<LimitSet, 'id' | 'projectId'> = {
  version: 1,
  title: 'Fifth order on the bench',
  standard: '',
  edition: '',
  tableRef: '',
  appliesWhen: '',
  quantity: 'current',
  unit: 'A',
  basis: 'absolute',
  referenceParameter: null,
  procedure: 'plain',
  parameters: [],
  orders: [{ order: 5, limit: 1 }],
  totals: [],
  source: ['Made for the tests'],
  confidence: 'low',
  evidence: '',
  notes: [],
};

/** An invitation that nobody answered, and its message. */
export async function newInvitation(database: Database, { projectId, userId }: Owner) {
  const [row] = await database
    .insert(schema.invitations)
    .values({
      projectId,
      email: `${randomUUID()}@example.com`,
      role: 'guest',
      tokenSha256: randomUUID(),
      invitedById: userId,
      expiresAt: new Date(Date.now() + 3_600_000),
    })
    .returning();
  return made(row);
}

/** A message that waits to be sent. */
export async function newMail(database: Database, { projectId }: Pick<Owner, 'projectId'>) {
  const [row] = await database
    .insert(schema.mails)
    .values({
      projectId,
      kind: 'review-requested',
      toAddress: 'reader@example.com',
      subject: 'Review requested',
      text: 'A report waits',
      html: '<p>A report waits</p>',
    })
    .returning();
  return made(row);
}

/** A study of a sine with one version and no stages. */
export async function newStudy(database: Database, { projectId, userId }: Owner) {
  lastNumber += 1;
  const [row] = await database
    .insert(schema.studies)
    .values({ projectId, number: 100_000 + lastNumber, name: 'Filter' })
    .returning();
  const study = made(row);
  const series = { frequencyHz: 50, dc: 0, components: [{ order: 1, rms: 1, phaseDeg: -90 }] };
  const figures = { rms: 1, fundamentalRms: 1, thdF: 0, thdR: 0, peak: Math.SQRT2, crestFactor: Math.SQRT2 };
  const order = { order: 1, frequencyHz: 50, inputRms: 1, outputRms: 1, gain: 1 };
  await database.insert(schema.studyVersions).values({
    ...{ studyId: study.id, version: 1, authorId: userId, series },
    definition: studyDefinitionSchema.parse({
      input: { kind: 'harmonics', series },
      ...{ inputQuantity: 'current', inputUnit: 'A', outputQuantity: 'current', outputUnit: 'A' },
      ...{ stages: [], judgement: null },
    }),
    result: {
      engineVersion: '0.2.0',
      stability: { verdict: 'stable', reason: 'Every pole has a negative real part.', poles: [] },
      ...{ input: figures, output: figures, verdictBefore: null, verdictAfter: null, spread: null },
      orders: [{ ...order, inputPhaseDeg: -90, outputPhaseDeg: -90 }],
      warnings: [],
    },
  });
  return study;
}
