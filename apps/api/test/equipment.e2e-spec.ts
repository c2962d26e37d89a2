import { equipmentPageSchema, equipmentSchema, recordingSchema, type Equipment } from '@overtally/contracts';
import { randomUUID } from 'node:crypto';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareWave } from './support/captures.js';
import { newProject } from './support/factories.js';
import { newIssued, newJudged } from './support/judged-reports.js';
import { newEquipment } from './support/project-contents.js';
import { settled, upload } from './support/recordings.js';
import { sendByTus } from './support/tus.js';
import { sessionCookie } from './support/sessions.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let technician: TestAgent;
let list: string;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
  list = `/api/projects/${test.project.id}/equipment`;
});
afterAll(() => test.close());

/** Reading and analysing, also on a machine that has other work. */
const patienceMs = 60_000;
const capture = csvOf(squareWave(10_000, 4_000), 10_000);

async function enter(change: object = {}): Promise<Equipment> {
  const body = {
    name: 'Compressor',
    model: 'RC-210',
    serialNumber: '0417',
    ratings: { voltageV: 230, powerW: 900, emissionClass: 'A' },
    operatingModes: [{ name: 'Full load' }, { name: 'Standby', description: 'Display on' }],
    ...change,
  };
  return equipmentSchema.parse((await technician.post(list).send(body).expect(201)).body);
}

async function newChain(name: string): Promise<string> {
  const instrument = { kind: 'recorder', name, serialNumber: randomUUID() };
  const { id } = (await technician.post('/api/instruments').send(instrument).expect(201)).body;
  await technician
    .post(`/api/instruments/${id}/calibrations`)
    .send({ calibratedOn: '2025-03-10', dueOn: '2026-03-10' })
    .expect(201);
  const chain = { name, instrumentIds: [id] };
  return (await technician.post('/api/measuring-chains').send(chain).expect(201)).body.id;
}

describe('equipment under test', () => {
  it('is entered with ratings and modes, found, changed and deleted', async () => {
    const made = await enter({ name: 'Hood module' });
    expect(made.operatingModes.map(({ name }) => name)).toEqual(['Full load', 'Standby']);
    const found = equipmentPageSchema.parse((await technician.get(list).query({ q: 'HOOD' })).body);
    expect(found.items.map(({ id }) => id)).toEqual([made.id]);
    const [full, standby] = made.operatingModes;
    // Modes that change their names with each other, their order, and one that is new.
    const operatingModes = [
      { id: standby!.id, name: 'Full load' },
      { id: full!.id, name: 'Standby' },
      { name: 'Off' },
    ];
    const path = `/api/equipment/${made.id}`;
    const { body } = await technician.patch(path).send({ ratings: {}, operatingModes }).expect(200);
    const changed = equipmentSchema.parse(body);
    expect(changed.ratings).toEqual({});
    expect(changed.operatingModes.map(({ id, name }) => [id, name])).toEqual([
      [standby!.id, 'Full load'],
      [full!.id, 'Standby'],
      [expect.any(String), 'Off'],
    ]);
    await technician.patch(path).send({ operatingModes: [] }).expect(200);
    await technician.delete(path).expect(204);
    await technician.get(path).expect(404);
  });

  it('refuses what cannot be: no name, ratings below zero, modes of one name or of other equipment', async () => {
    await technician.post(list).send({ name: ' ' }).expect(400);
    await technician
      .post(list)
      .send({ name: 'x', ratings: { powerW: -1 } })
      .expect(400);
    await technician
      .post(list)
      .send({ name: 'x', ratings: { torque: 1 } })
      .expect(400);
    const twice = [{ name: 'On' }, { name: 'On' }];
    await technician.post(list).send({ name: 'x', operatingModes: twice }).expect(400);
    const [one, other] = [await enter(), await enter()];
    const operatingModes = [{ id: other.operatingModes[0]!.id, name: 'Taken' }];
    const reply = await technician.patch(`/api/equipment/${one.id}`).send({ operatingModes }).expect(422);
    expect(reply.body.errors[0].path).toBe('operatingModes.0.id');
  });

  it('is read by every member and written at the bench only', async () => {
    const { id } = await enter();
    const guest = await test.signIn('guest');
    await guest.get(`/api/equipment/${id}`).expect(200);
    await guest.patch(`/api/equipment/${id}`).send({ name: 'x' }).expect(403);
    await (await test.signIn('stranger')).get(`/api/equipment/${id}`).expect(404);
    await (await test.signIn('administrator')).delete(`/api/equipment/${id}`).expect(403);
  });
});

describe('a recording of equipment', () => {
  it(
    'takes equipment, mode, chain and conditions with the upload, and keeps its chain by its channels',
    { timeout: 180_000 },
    async () => {
      const equipment = await enter();
      const [mode] = equipment.operatingModes;
      const [chainId, clampId] = [await newChain('Bench 1'), await newChain('Bench 2')];
      const conditions = { ambientTemperatureC: 23.5, supply: 'power source' };
      const sent = await upload(technician, test.project.id, capture, 'load.csv', {
        ...{ equipmentId: equipment.id, operatingModeId: mode!.id, measuringChainId: chainId },
        ...{ conditions: JSON.stringify(conditions), capturedAt: '2026-03-10T12:00:00Z' },
      });
      const made = recordingSchema.parse(await settled(technician, sent.id, patienceMs));
      expect(made).toMatchObject({
        eut: 'Compressor, RC-210, serial no. 0417',
        equipment: { id: equipment.id, ratings: { powerW: 900 } },
        operatingMode: { id: mode!.id, name: 'Full load', retired: false },
        // The day on which calibration is due belongs to it.
        chain: { id: chainId, name: 'Bench 1', calibrationState: 'valid' },
        conditions,
      });
      const path = `/api/recordings/${made.id}`;
      const channels = [{ index: 0, measuringChainId: clampId }];
      const change = { channels, capturedAt: '2026-03-11T12:00:00Z' };
      const changed = recordingSchema.parse((await technician.patch(path).send(change).expect(200)).body);
      expect(changed.channels[0]!.chain).toMatchObject({ id: clampId, calibrationState: 'overdue' });
      // A chain of a channel says nothing of its samples: no new analysis.
      expect(changed).toMatchObject({ status: 'ready', latestAnalysisId: made.latestAnalysisId });
      await technician.post(`${path}/read`).send({ sampleRateHz: 10_000 }).expect(202);
      const again = await settled(technician, made.id, patienceMs);
      expect(again.latestAnalysisId).not.toBe(made.latestAnalysisId);
      expect(again.channels[0]!.chain?.id).toBe(clampId);

      const listed = await technician
        .get(`/api/projects/${test.project.id}/recordings`)
        .query({ equipmentId: equipment.id })
        .expect(200);
      expect(listed.body.items.map(({ id }: { id: string }) => id)).toEqual([made.id]);
      expect((await technician.get(`/api/measuring-chains/${clampId}`)).body.recordings).toBe(1);
    },
  );

  it('takes them when a resumable upload is finished', async () => {
    const equipment = await enter({ name: 'Fan' });
    const cookie = await sessionCookie(test.database, test.people.technician.id);
    const { port } = test.http.address() as { port: number };
    const endpoint = `http://127.0.0.1:${port}/api/projects/${test.project.id}/uploads`;
    const address = await sendByTus(capture, { endpoint, cookie, fileName: 'fan.csv' });
    const finish = `${new URL(address).pathname}/recordings`;
    const strange = { equipmentId: randomUUID() };
    await technician.post(finish).send(strange).expect(422);
    const fields = { equipmentId: equipment.id, conditions: { relativeHumidityPercent: 40 } };
    const reply = await technician.post(finish).send(fields).expect(202);
    expect(reply.body.items[0]).toMatchObject({
      equipment: { id: equipment.id },
      conditions: { relativeHumidityPercent: 40 },
    });
  });

  it('refuses equipment of another project, a mode of other equipment, and what is retired', async () => {
    const [one, other] = [await enter({ name: 'One' }), await enter({ name: 'Other' })];
    const project = await newProject(test.database, {
      members: { [test.people.technician.id]: 'technician' },
    });
    const owner = { projectId: project.id, userId: test.people.technician.id };
    const foreign = await newEquipment(test.database, owner);
    const { id } = await upload(technician, test.project.id, capture, 'refused.csv');
    const patch = (change: object) => technician.patch(`/api/recordings/${id}`).send(change);
    const path = async (change: object) => (await patch(change).expect(422)).body.errors[0].path;
    expect(await path({ equipmentId: foreign.id })).toBe('equipmentId');
    expect(await path({ equipmentId: one.id, operatingModeId: other.operatingModes[0]!.id })).toBe(
      'operatingModeId',
    );
    expect(await path({ operatingModeId: one.operatingModes[0]!.id })).toBe('operatingModeId');
    expect(await path({ measuringChainId: randomUUID() })).toBe('measuringChainId');
    await patch({ conditions: { ambientTemperatureC: 'warm' } }).expect(400);
    await technician.patch(`/api/equipment/${other.id}`).send({ retired: true }).expect(200);
    expect(await path({ equipmentId: other.id })).toBe('equipmentId');

    const mode = one.operatingModes[0]!.id;
    const named = await patch({ equipmentId: one.id, operatingModeId: mode, eut: 'Sample 3' }).expect(200);
    expect(named.body).toMatchObject({ eut: 'Sample 3', operatingMode: { id: mode } });
    // What a recording names stays with it when it is retired, and can be said again.
    await technician.patch(`/api/equipment/${one.id}`).send({ retired: true }).expect(200);
    const kept = await patch({ equipmentId: one.id, remark: 'x' }).expect(200);
    expect(kept.body.equipment.retiredAt).not.toBeNull();
    const without = await patch({ equipmentId: null }).expect(200);
    expect(without.body).toMatchObject({ equipment: null, operatingMode: null });
  });

  it('keeps its equipment and mode from being deleted, and says to retire them', async () => {
    const equipment = await enter({ name: 'Kept' });
    const [full, standby] = equipment.operatingModes;
    const { id } = await upload(technician, test.project.id, capture, 'kept.csv', {
      ...{ equipmentId: equipment.id, operatingModeId: full!.id },
    });
    const path = `/api/equipment/${equipment.id}`;
    const refused = await technician.delete(path).expect(409);
    expect(refused.body.detail).toContain('retire');
    const left = { operatingModes: [{ id: standby!.id, name: 'Standby' }] };
    const reply = await technician.patch(path).send(left).expect(409);
    expect(reply.body).toMatchObject({ code: 'mode-in-use', errors: [{ path: 'operatingModes' }] });
    const retired = {
      operatingModes: [
        { id: full!.id, name: 'Full load', retired: true },
        { id: standby!.id, name: 'Standby' },
      ],
    };
    const after = equipmentSchema.parse((await technician.patch(path).send(retired).expect(200)).body);
    expect(after).toMatchObject({ recordings: 1, operatingModes: [{ retired: true, recordings: 1 }, {}] });
    expect((await technician.get(`/api/recordings/${id}`)).body.operatingMode).toMatchObject({
      retired: true,
    });
  });

  it('stands in the report with its ratings, mode, conditions and the chain of the channel', async () => {
    const { mode, ...equipment } = await newEquipment(test.database, {
      ...{ projectId: test.project.id, userId: test.people.technician.id },
    });
    const measuringChainId = await newChain('Bench 3');
    const { verdict } = await newJudged(test, undefined, {
      ...{ equipmentId: equipment.id, operatingModeId: mode.id, measuringChainId },
      ...{ conditions: { place: 'Bay 2' }, capturedAt: new Date('2026-03-10T09:00:00Z') },
    });
    const [section] = (await newIssued(test, [verdict.id])).content.sections;
    expect(section).toMatchObject({
      equipment: { id: equipment.id, name: 'Compressor' },
      operatingMode: { id: mode.id, name: 'Full load' },
      chain: { id: measuringChainId, calibrationState: 'valid' },
      conditions: { place: 'Bay 2' },
    });
  });
});
