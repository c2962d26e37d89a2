import {
  calibrationSchema,
  instrumentPageSchema,
  instrumentSchema,
  measuringChainListItemSchema,
  type Calibration,
  type Instrument,
} from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { createHash, randomUUID } from 'node:crypto';
import { buffer } from 'node:stream/consumers';
import type { Readable } from 'node:stream';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ChainsService } from '../dist/instruments/chains.service.js';
import { InstrumentsService } from '../dist/instruments/instruments.service.js';
import { Storage } from '../dist/storage/storage.js';
import { referredKeys } from '../dist/worker/referred-keys.js';
import { newIssued, newJudged } from './support/judged-reports.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp();
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

const day = (offset: number) => new Date(Date.now() + offset * 86_400_000).toISOString().slice(0, 10);

async function newInstrument(change: object = {}): Promise<Instrument> {
  const body = { kind: 'current-transducer', name: 'Clamp', serialNumber: randomUUID(), ...change };
  const reply = await technician.post('/api/instruments').send(body).expect(201);
  return instrumentSchema.parse(reply.body);
}

async function calibrate(id: string, calibratedOn: string, dueOn: string): Promise<Calibration> {
  const reply = await technician
    .post(`/api/instruments/${id}/calibrations`)
    .send({ calibratedOn, dueOn })
    .expect(201);
  return calibrationSchema.parse(reply.body);
}

async function newChain(instrumentIds: string[], name = randomUUID()) {
  const reply = await technician.post('/api/measuring-chains').send({ name, instrumentIds }).expect(201);
  return measuringChainListItemSchema.parse(reply.body);
}

const pdf = Buffer.concat([
  Buffer.from('%PDF-1.7\n'),
  Buffer.from(Array.from({ length: 4096 }, (_, i) => i & 255)),
]);

/** Receives a reply as bytes, whatever its type. */
const asBytes = (reply: unknown, done: (error: Error | null, body: Buffer) => void) =>
  void buffer(reply as Readable).then((body) => done(null, body));

describe('an instrument', () => {
  it('is entered, found by its words and state, changed and retired', async () => {
    const late = await newInstrument({ name: 'Late clamp', manufacturer: 'Orrel', model: 'C-20' });
    await calibrate(late.id, day(-400), day(-1));
    const soon = await newInstrument({ name: 'Soon clamp', manufacturer: 'Orrel' });
    await calibrate(soon.id, day(-300), day(30));
    const good = await newInstrument({ name: 'Good clamp', manufacturer: 'Orrel' });
    await calibrate(good.id, day(-1), day(31));
    const never = await newInstrument({ name: 'Never clamp', manufacturer: 'Orrel' });
    const names = async (query: object) => {
      const { body } = await technician
        .get('/api/instruments')
        .query({ q: 'orrel', ...query })
        .expect(200);
      return instrumentPageSchema.parse(body).items.map(({ name }) => name);
    };
    expect(await names({})).toEqual(['Good clamp', 'Late clamp', 'Never clamp', 'Soon clamp']);
    expect(await names({ state: 'overdue' })).toEqual(['Late clamp']);
    expect(await names({ state: 'valid' })).toEqual(['Good clamp', 'Soon clamp']);
    expect(await names({ state: 'due-soon' })).toEqual(['Soon clamp']);
    expect(await names({ state: 'none' })).toEqual(['Never clamp']);
    const first = (await technician.get('/api/instruments').query({ q: 'orrel', limit: 3 })).body;
    const rest = await names({ limit: 3, cursor: first.nextCursor });
    expect(rest).toEqual(['Soon clamp']);
    const { body } = await technician
      .patch(`/api/instruments/${never.id}`)
      .send({ retired: true })
      .expect(200);
    expect(body.retiredAt).not.toBeNull();
    expect(await names({ retired: 'true' })).toEqual(['Never clamp']);
    expect(await names({ retired: 'false', state: 'none' })).toEqual([]);
  });

  it('stands once by manufacturer, model and serial number, and names somebody who has an account', async () => {
    const body = { kind: 'recorder', name: 'Recorder', manufacturer: 'Vessel', serialNumber: '77' };
    await technician.post('/api/instruments').send(body).expect(201);
    const again = await technician.post('/api/instruments').send(body).expect(409);
    expect(again.body).toMatchObject({ code: 'instrument-known', errors: [{ path: 'serialNumber' }] });
    const nobody = { ...body, serialNumber: '78', responsibleId: randomUUID() };
    const reply = await technician.post('/api/instruments').send(nobody).expect(422);
    expect(reply.body.errors[0].path).toBe('responsibleId');
    await technician
      .post('/api/instruments')
      .send({ ...body, serialNumber: ' ' })
      .expect(400);
    await technician
      .post('/api/instruments')
      .send({ ...body, kind: 'hammer' })
      .expect(400);
    await technician.get(`/api/instruments/${randomUUID()}`).expect(404);
  });

  it('is shared by the laboratory and hidden from its customers', async () => {
    const { id } = await newInstrument();
    for (const role of ['guest', 'stranger'] as const) {
      const agent = await test.signIn(role);
      await agent.get('/api/instruments').expect(403);
      await agent.get(`/api/instruments/${id}`).expect(403);
    }
    for (const role of ['analyst', 'manager', 'administrator'] as const) {
      const agent = await test.signIn(role);
      await agent.patch(`/api/instruments/${id}`).send({ remark: role }).expect(200);
      expect((await agent.get('/api/auth/me')).body.worksInLaboratory).toBe(true);
    }
    expect((await (await test.signIn('guest')).get('/api/auth/me')).body.worksInLaboratory).toBe(false);
  });
});

describe('a calibration', () => {
  it('refuses days in the wrong order or yet to come', async () => {
    const { id } = await newInstrument();
    const post = (body: object) => technician.post(`/api/instruments/${id}/calibrations`).send(body);
    await post({ calibratedOn: '2026-02-01', dueOn: '2026-02-01' }).expect(400);
    await post({ calibratedOn: '2026-02-30', dueOn: '2027-02-01' }).expect(400);
    const future = await post({ calibratedOn: day(3), dueOn: day(300) }).expect(422);
    expect(future.body.errors[0].path).toBe('calibratedOn');
    await technician.get(`/api/instruments/${id}/calibrations`).expect(200, { items: [], nextCursor: null });
  });

  it('gives its certificate back byte for byte, as a file to keep', async () => {
    const { id } = await newInstrument();
    const made = await technician
      .post(`/api/instruments/${id}/calibrations`)
      .field('calibratedOn', '2026-01-15')
      .field('dueOn', '2027-01-15')
      .field('certificateNumber', 'K-118')
      .attach('certificate', pdf, 'Prüfschein K-118.pdf')
      .expect(201);
    const calibration = calibrationSchema.parse(made.body);
    const sha256 = createHash('sha256').update(pdf).digest('hex');
    expect(calibration.certificate).toEqual({ name: 'Prüfschein K-118.pdf', size: pdf.length, sha256 });
    const reply = await technician
      .get(`/api/calibrations/${calibration.id}/certificate`)
      .buffer(true)
      .parse(asBytes)
      .expect(200);
    expect(Buffer.compare(reply.body as Buffer, pdf)).toBe(0);
    expect(reply.headers).toMatchObject({
      'content-type': 'application/pdf',
      'x-content-type-options': 'nosniff',
    });
    // RFC 6266: a file name beyond Latin characters stands in filename*.
    expect(reply.headers['content-disposition']).toMatch(/^attachment; .*filename\*=UTF-8''Pr%C3%BCfschein/);

    const storage = test.app.get(Storage, { strict: false });
    const [key] = await test.database
      .select({ key: schema.calibrations.certificateKey })
      .from(schema.calibrations)
      .where(eq(schema.calibrations.id, calibration.id));
    const stray = `calibrations/${randomUUID()}/certificate.pdf`;
    expect(await referredKeys(test.database, [key!.key!, stray])).toEqual(new Set([key!.key]));
    await technician.delete(`/api/calibrations/${calibration.id}`).expect(204);
    expect(await storage.exists(key!.key!)).toBe(false);
    await technician.get(`/api/calibrations/${calibration.id}/certificate`).expect(404);
  });

  it('takes no file of another kind and none that is too large, and says when there is none', async () => {
    const { id } = await newInstrument();
    const send = (bytes: Buffer, name: string) =>
      technician
        .post(`/api/instruments/${id}/calibrations`)
        .field('calibratedOn', '2026-01-15')
        .field('dueOn', '2027-01-15')
        .attach('certificate', bytes, name);
    const page = await send(Buffer.from('<html><script>'), 'certificate.pdf').expect(422);
    expect(page.body.errors[0].path).toBe('certificate');
    await send(Buffer.concat([pdf, Buffer.alloc(20 * 1024 * 1024)]), 'large.pdf').expect(413);
    const { id: bare } = await calibrate(id, '2026-01-15', '2027-01-15');
    const none = await technician.get(`/api/calibrations/${bare}/certificate`).expect(404);
    expect(none.body.code).toBe('no-certificate');
  });

  it('counts at the moment that is asked for, up to the day it is due', async () => {
    const clamp = await newInstrument();
    const earlier = await calibrate(clamp.id, '2025-03-10', '2026-03-10');
    const later = await calibrate(clamp.id, '2026-04-02', '2027-04-02');
    const chain = await newChain([clamp.id]);
    const chains = test.app.get(ChainsService, { strict: false });
    const at = async (moment: string) => {
      const { calibrationState, instruments } = await chains.chainAt(chain.id, new Date(moment));
      return [calibrationState, instruments[0]!.calibration?.id];
    };
    expect(await at('2025-03-09T23:59:59Z')).toEqual(['none', undefined]);
    expect(await at('2026-03-10T23:59:59Z')).toEqual(['valid', earlier.id]);
    expect(await at('2026-03-11T00:00:00Z')).toEqual(['overdue', earlier.id]);
    expect(await at('2026-04-02T00:00:00Z')).toEqual(['valid', later.id]);
  });

  it('is told of once when it is due within some days or overdue', async () => {
    const now = new Date('2031-06-15T12:00:00Z');
    const clamp = await newInstrument({ responsibleId: test.people.analyst.id });
    const { id } = await calibrate(clamp.id, day(-2), '2031-07-15');
    const service = test.app.get(InstrumentsService, { strict: false });
    const due = async (days: number) =>
      (await service.dueSoon(days, now)).filter(({ instrument }) => instrument.id === clamp.id);
    expect(await due(29)).toEqual([]);
    expect(await due(30)).toMatchObject([
      { calibration: { id, dueOn: '2031-07-15' }, responsible: { email: 'analyst@example.com' } },
    ]);
    await test.database.transaction((tx) => service.markDueNoticeSent(tx, [id]));
    expect(await due(30)).toEqual([]);
  });
});

describe('a measuring chain', () => {
  it('keeps the order of its instruments and is as good as the worst of them', async () => {
    const [clamp, recorder] = [await newInstrument(), await newInstrument({ kind: 'recorder' })];
    await calibrate(recorder.id, day(-10), day(300));
    const chain = await newChain([recorder.id, clamp.id]);
    expect(chain.instruments.map(({ id }) => id)).toEqual([recorder.id, clamp.id]);
    expect(chain.calibrationState).toBe('none');
    const path = `/api/measuring-chains/${chain.id}`;
    const turned = await technician
      .patch(path)
      .send({ instrumentIds: [clamp.id, recorder.id] })
      .expect(200);
    expect(turned.body.instruments.map(({ id }: Instrument) => id)).toEqual([clamp.id, recorder.id]);
    const kept = await technician.delete(`/api/instruments/${clamp.id}`).expect(409);
    expect(kept.body.detail).toContain(chain.name);
    await technician.delete(path).expect(204);
    await technician.delete(`/api/instruments/${clamp.id}`).expect(204);
    await technician.get(path).expect(404);
  });

  it('refuses a name that is taken, no instruments, one twice, unknown and retired ones', async () => {
    const { id } = await newInstrument();
    const { name } = await newChain([id]);
    const post = (body: object) => technician.post('/api/measuring-chains').send({ name: 'Other', ...body });
    await post({ name, instrumentIds: [id] }).expect(409);
    await post({ instrumentIds: [] }).expect(400);
    await post({ instrumentIds: [id, id] }).expect(400);
    const unknown = await post({ instrumentIds: [id, randomUUID()] }).expect(422);
    expect(unknown.body.errors[0].path).toBe('instrumentIds.1');
    await technician.patch(`/api/instruments/${id}`).send({ retired: true }).expect(200);
    await post({ instrumentIds: [id] }).expect(422);
  });
});

describe('what an issued report refers to', () => {
  it('stays: calibration, instrument and chain are refused their deletion with the way out', async () => {
    const clamp = await newInstrument();
    const { id: calibrationId } = await calibrate(clamp.id, day(-10), day(300));
    const chain = await newChain([clamp.id]);
    const { verdict } = await newJudged(test, undefined, { measuringChainId: chain.id });
    const report = await newIssued(test, [verdict.id]);
    const section = report.content.sections[0]!;
    expect(section.chain).toMatchObject({
      id: chain.id,
      calibrationState: 'valid',
      instruments: [{ id: clamp.id, calibration: { id: calibrationId } }],
    });
    const targets = [chain.id, clamp.id, calibrationId].map((targetId) => ({
      reportId: report.id,
      targetId,
      kind: 'measuring-chain' as const,
    }));
    await test.database.insert(schema.reportReferences).values(targets).onConflictDoNothing();
    const refused = await technician.delete(`/api/calibrations/${calibrationId}`).expect(409);
    expect(refused.body).toMatchObject({ code: 'calibration-in-report' });
    expect(refused.body.detail).toContain('issued report');
    await technician.delete(`/api/instruments/${clamp.id}`).expect(409);
    await technician.delete(`/api/measuring-chains/${chain.id}`).expect(409);
  });
});

describe('the laboratory', () => {
  it('is named by administrators and read by everybody who signs in', async () => {
    const words = { name: 'Test bench 4', address: 'Quay 3, Brackwater', contact: '', accreditation: '' };
    await technician.put('/api/laboratory').send(words).expect(403);
    const administrator = await test.signIn('administrator');
    await administrator.put('/api/laboratory').send({ name: 'x' }).expect(400);
    await administrator.put('/api/laboratory').send(words).expect(200, words);
    await administrator
      .put('/api/laboratory')
      .send({ ...words, contact: 'desk' })
      .expect(200);
    await (await test.signIn('guest')).get('/api/laboratory').expect(200, { ...words, contact: 'desk' });
  });
});
