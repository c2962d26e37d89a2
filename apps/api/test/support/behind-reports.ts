import type { InstrumentRef, MeasuringChain, Report, ReportSection } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { randomUUID } from 'node:crypto';
import supertest from 'supertest';
import { made, newPerson, type Person } from './factories.js';
import { sessionCookie } from './sessions.js';
import type { TestApp } from './test-app.js';

/** What stands behind one section: equipment with a mode, and a chain of one instrument with a calibration. */
export type Behind = Pick<ReportSection, 'equipment' | 'operatingMode'> & {
  chain: MeasuringChain;
  instrument: InstrumentRef;
};

/** Makes it all in the database. @param dueOn when calibration was due; the capture is of 26 November 2026 */
export async function newBehind({ database, people, project }: TestApp, dueOn: string): Promise<Behind> {
  const createdById = people.manager.id;
  const name = `Current probe ${randomUUID().slice(0, 8)}`;
  const [instrument] = await database
    .insert(schema.instruments)
    .values({ kind: 'current-transducer', name, serialNumber: randomUUID(), createdById })
    .returning();
  const [calibration] = await database
    .insert(schema.calibrations)
    .values({ instrumentId: made(instrument).id, calibratedOn: '2025-02-03', dueOn, createdById })
    .returning();
  const [chain] = await database
    .insert(schema.measuringChains)
    .values({ name: `Bench ${name}`, createdById })
    .returning();
  const chainId = made(chain).id;
  const instrumentId = made(instrument).id;
  await database.insert(schema.measuringChainInstruments).values({ chainId, position: 0, instrumentId });
  const [eut] = await database
    .insert(schema.equipment)
    .values({ projectId: project.id, name: 'Dimmer', createdById })
    .returning();
  const [mode] = await database
    .insert(schema.operatingModes)
    .values({ equipmentId: made(eut).id, position: 0, name: 'Half power' })
    .returning();
  const state = dueOn < '2026-11-26' ? 'overdue' : 'valid';
  const { createdAt, certificateName: _n, certificateSize: _s, ...dates } = made(calibration);
  const ref: InstrumentRef = {
    ...{ id: instrumentId, kind: 'current-transducer', name, manufacturer: '', model: '' },
    serialNumber: made(instrument).serialNumber,
    calibration: { ...dates, certificate: null, createdAt: createdAt.toISOString() },
    calibrationState: state,
  };
  const { id, manufacturer, model, serialNumber, ratings, receivedOn, remark } = made(eut);
  return {
    equipment: { id, name: 'Dimmer', manufacturer, model, serialNumber, ratings, receivedOn, remark },
    operatingMode: { id: made(mode).id, name: 'Half power', description: '' },
    chain: {
      id: chainId,
      name: made(chain).name,
      description: '',
      instruments: [ref],
      calibrationState: state,
    },
    instrument: ref,
  };
}

/** Puts into the frozen content of a report in review what a step before would have put there. */
export async function freezeWith(
  { database }: TestApp,
  { id, content }: Pick<Report, 'id' | 'content'>,
  change: (section: ReportSection) => object,
): Promise<void> {
  const sections = content.sections.map((section) => ({ ...section, ...change(section) }));
  await database
    .update(schema.reports)
    .set({ content: { ...content, sections } })
    .where(eq(schema.reports.id, id));
}

/** Another member of the project in the role, and requests of theirs. */
export async function anotherMember(test: TestApp, role: 'analyst' | 'manager') {
  const person: Person = await newPerson(test.database, { name: `Second ${role}` });
  await test.database.insert(schema.members).values({ projectId: test.project.id, userId: person.id, role });
  const cookie = await sessionCookie(test.database, person.id);
  return { person, agent: supertest.agent(test.http).set('Cookie', cookie) };
}
