import { randomUUID } from 'node:crypto';
import type { ResourceKind } from '../../dist/access/require-permission.decorator.js';
import { newPerson } from './factories.js';
import {
  newAnalysis,
  newEquipment,
  newInvitation,
  newLimitSet,
  newMail,
  newNote,
  newReadingRule,
  newRecording,
  newReport,
  newStudy,
  newVerdict,
} from './project-contents.js';
import type { TestApp } from './test-app.js';

/** One thing of each kind, all in the project of the test's people. */
export type Examples = Record<ResourceKind, string>;

/**
 * Makes one thing of each kind.
 * @param userId whose they are
 */
export async function makeExamples({ database, project }: TestApp, userId: string): Promise<Examples> {
  const owner = { projectId: project.id, userId };
  const recording = await newRecording(database, owner);
  const analysis = await newAnalysis(database, recording.id, owner);
  const verdict = await newVerdict(database, analysis.id, owner);
  return {
    project: project.id,
    equipment: (await newEquipment(database, owner)).id,
    'reading-rule': (await newReadingRule(database, owner)).id,
    recording: recording.id,
    analysis: analysis.id,
    note: (await newNote(database, analysis.id, owner)).id,
    verdict: verdict.id,
    study: (await newStudy(database, owner)).id,
    report: (await newReport(database, verdict.id, owner)).id,
    'limit-set': (await newLimitSet(database, owner)).id,
    invitation: (await newInvitation(database, owner)).id,
    mail: (await newMail(database, owner)).id,
  };
}

/** Values of path parameters that do not name what the permission is held on, by parameter name. */
export async function makeOtherParameters({ database }: TestApp): Promise<Record<string, string>> {
  const someone = await newPerson(database);
  return { id: someone.id, userId: someone.id, uploadId: randomUUID() };
}
