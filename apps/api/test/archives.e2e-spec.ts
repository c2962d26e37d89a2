import type { Recording, UploadOutcome } from '@overtally/contracts';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { readdir } from 'node:fs/promises';
import { request as httpRequest } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { deflateRawSync } from 'node:zlib';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { csvOf, squareThdFPercent, squareWave, wavOf } from './support/captures.js';
import { settled } from './support/recordings.js';
import { sessionCookie } from './support/sessions.js';
import { stores, type Store } from './support/stores.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { sendByTus } from './support/tus.js';
import { zipOf, type ZipEntry } from './support/zip.js';

const MiB = 2 ** 20;
const sampleRateHz = 10_000;
const wave = squareWave(sampleRateHz, 5_000);
const csv = csvOf(wave, sampleRateHz);
const wav = wavOf([Float32Array.from(wave)], sampleRateHz);
const sha256 = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex');

/** A COMTRADE record of two files (IEEE C37.111-1999, 5 and 6): one analog channel, 16-bit binary. */
function comtrade() {
  const lines = [
    'Bench,1,1999',
    '1,1A,0D',
    '1,U1,A,,V,0.0001,0,0,-32767,32767,1,1,P',
    '50',
    '1',
    `${sampleRateHz},${wave.length}`,
    '01/12/2026,12:00:00.000000',
    '01/12/2026,12:00:00.000000',
    'BINARY',
    '1',
    '',
  ];
  const dat = Buffer.alloc(10 * wave.length);
  wave.forEach((value, n) => {
    dat.writeUInt32LE(n + 1, 10 * n);
    dat.writeUInt32LE(n * (1e6 / sampleRateHz), 10 * n + 4);
    dat.writeInt16LE(Math.round(value / 0.0001), 10 * n + 8);
  });
  return { cfg: Buffer.from(lines.join('\r\n')), dat };
}

describe.each(stores)('archives of captures on %s', (kind, start) => {
  let store: Store;
  let test: TestApp;
  let technician: TestAgent;
  let base: string;

  beforeAll(async () => {
    store = await start();
    test = await startTestApp({ ...store.environment, WORKER: 'embedded', MAX_UPLOAD_MB: '48' });
    technician = await test.signIn('technician');
    base = `/api/projects/${test.project.id}`;
  });
  afterAll(async () => {
    await test.close();
    await store.stop();
  });

  async function sent(
    entries: readonly ZipEntry[] | Buffer,
    status = 202,
    fields: Record<string, string> = {},
  ) {
    const archive = Buffer.isBuffer(entries) ? entries : zipOf(entries);
    const request = technician.post(`${base}/archives`).attach('file', archive, 'bench.zip');
    for (const [name, value] of Object.entries(fields)) void request.field(name, value);
    const { body } = await request.expect(status);
    expect(await readdir(test.app.get(AppConfig).spoolFolder)).toEqual([]);
    return body;
  }

  /** What is left out of an archive with one good file besides, which comes in all the same. */
  async function leftOut(entry: ZipEntry): Promise<string> {
    const { items, leftOut: out } = (await sent([entry, { path: 'good.csv', bytes: csv }])) as UploadOutcome;
    expect(items.map(({ file }) => file.name)).toEqual(['good.csv']);
    expect(out).toHaveLength(1);
    return out[0]!.reason;
  }

  it('become recordings, one each, as the files are', { timeout: 60_000 }, async () => {
    const entries = [
      { path: 'day 1/', bytes: Buffer.alloc(0), method: 0 },
      { path: 'day 1/größe.csv', bytes: csv },
      { path: 'day 1/stored.wav', bytes: wav, method: 0 },
      { path: '__MACOSX/day 1/._größe.csv', bytes: Buffer.from('x') },
      { path: 'day 1/.DS_Store', bytes: Buffer.from('x') },
    ];
    const outcome = (await sent(entries, 202, { remark: 'run 7', eut: 'Kettle' })) as UploadOutcome;
    expect(outcome.leftOut).toEqual([]);
    expect(outcome.items.map(({ name, file, remark, eut }) => ({ name, file, remark, eut }))).toEqual([
      {
        name: 'größe',
        file: { name: 'größe.csv', size: csv.length, sha256: sha256(csv) },
        remark: 'run 7',
        eut: 'Kettle',
      },
      {
        name: 'stored',
        file: { name: 'stored.wav', size: wav.length, sha256: sha256(wav) },
        remark: 'run 7',
        eut: 'Kettle',
      },
    ]);
    const ready = await settled(technician, outcome.items[0]!.id, 40_000);
    // Closed form: a square wave has THD-F = sqrt(sum of 1/n²) over its odd orders.
    expect(Math.abs(ready.summaries[0]!.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
  });

  it('join the two files of a COMTRADE record', { timeout: 60_000 }, async () => {
    const { cfg, dat } = comtrade();
    const entries = [
      { path: 'relay/Trip.DAT', bytes: dat },
      { path: 'relay/trip.cfg', bytes: cfg },
      { path: 'relay/trip.hdr', bytes: Buffer.from('about it') },
      { path: 'other/trip.cfg', bytes: cfg },
    ];
    const { items, leftOut: out } = (await sent(entries)) as UploadOutcome;
    expect(out.map(({ path }) => path)).toEqual(['relay/trip.hdr', 'other/trip.cfg']);
    expect(items.map(({ file }) => file.name)).toEqual(['trip.cff']);
    const ready = await settled(technician, items[0]!.id, 40_000);
    expect(ready).toMatchObject({ status: 'ready', format: 'comtrade', sampleRateHz });
    expect(Math.abs(ready.summaries[0]!.thdFPercent! - squareThdFPercent)).toBeLessThan(0.05);
    const source = await technician.get(`/api/recordings/${items[0]!.id}/source`).buffer(true).expect(200);
    // IEC 60255-24: a section is a line that names it, and the bytes of what was a file.
    const text = (source.body as Buffer).toString('latin1');
    expect(text).toContain(`--- file type: CFG ---\r\n${cfg.toString('latin1')}`);
    expect(text).toContain(`--- file type: DAT BINARY: ${dat.length} ---\r\n${dat.toString('latin1')}`);
  });

  it.each<[string, Partial<ZipEntry>, RegExp]>([
    ['climbs out of its folder', { path: '../../etc/cron.d/x' }, /\.\./],
    ['has an absolute path', { path: '/etc/passwd' }, /absolute/],
    ['has a drive in its path', { path: 'C:x.csv' }, /absolute/],
    ['has a backslash in its path', { path: '..\\..\\x.csv' }, /backslash/],
    ['has NUL in its path', { path: 'a.csv\0.png' }, /no text/],
    ['is a symbolic link', { path: 'link.csv', mode: 0o120777 }, /link/],
    ['is a device', { path: 'device', mode: 0o020666 }, /ordinary/],
    ['is encrypted', { path: 'secret.csv', flags: 0x801 }, /encrypted/],
    ['is packed by another method', { path: 'packed.csv', method: 12 }, /method 12/],
    [
      'is an archive itself',
      { path: 'nested.csv', bytes: zipOf([{ path: 'a.csv', bytes: csv }]) },
      /archive/,
    ],
    ['is a picture', { path: 'bench.png', bytes: Buffer.from('\u0089PNG\r\n\u001a\n', 'latin1') }, /picture/],
    [
      'is text without a table',
      { path: 'notes.txt', bytes: Buffer.from('Kettle on bench 2.\nLid open.\n') },
      /no line of it holds numeric/,
    ],
    ['is empty', { path: 'empty.csv', bytes: Buffer.alloc(0) }, /empty/],
    ['comes twice', { path: 'good.csv', bytes: wav }, /before/],
    ['has another checksum', { path: 'broken.csv', told: { crc32: 1 } }, /CRC-32/],
    ['inflates to more than it tells', { path: 'liar.csv', told: { uncompressedSize: 10 } }, /unpacked/],
    ['overlaps another', { path: 'overlap.csv', told: { offset: 0 } }, /overlap/],
  ])('leave out what %s', async (what, entry, reason) => {
    const bad = { path: 'bad.csv', bytes: csv, ...entry };
    const good = { path: 'good.csv', bytes: csv };
    const both = what === 'comes twice' || what === 'overlaps another' ? [good, bad] : [bad, good];
    const { items, leftOut: out } = (await sent(both)) as UploadOutcome;
    expect(items.map(({ file }) => [file.name, file.sha256])).toEqual([['good.csv', sha256(csv)]]);
    expect(out).toHaveLength(1);
    expect(out[0]!.reason).toMatch(reason);
  });

  it('do not burst: neither what tells its size nor what hides it', { timeout: 60_000 }, async () => {
    const zeros = Buffer.alloc(40 * MiB);
    const packed = deflateRawSync(zeros);
    expect(packed.length).toBeLessThan(MiB / 16);
    const before = process.memoryUsage().rss;
    expect(await leftOut({ path: 'bomb.csv', bytes: zeros })).toMatch(
      /40 MiB or more from \d\d(\.\d)? KiB, over 250 times/,
    );
    // Gigabytes by the header, kilobytes in truth; and the other way round.
    expect(await leftOut({ path: 'bomb.csv', bytes: csv, told: { uncompressedSize: 0xfffffff0 } })).toMatch(
      /4 GiB/,
    );
    expect(await leftOut({ path: 'bomb.csv', bytes: zeros, told: { uncompressedSize: 1000 } })).toMatch(
      /unpacked/,
    );
    expect(process.memoryUsage().rss - before).toBeLessThan(200 * MiB);
    // Eight files that each pass and together do not: 48 MiB in all are the limit here.
    const large = Buffer.alloc(7 * MiB, csv);
    const many = Array.from({ length: 8 }, (_, n) => ({ path: `${n}.csv`, bytes: large }));
    const { items, leftOut: out } = (await sent(many)) as UploadOutcome;
    expect(items).toHaveLength(6);
    expect(out.map(({ reason }) => reason)).toEqual([
      expect.stringMatching(/42 MiB were unpacked before.*48 MiB in all/),
      expect.stringMatching(/42 MiB were unpacked before/),
    ]);
  });

  it.each<[string, () => Buffer, string]>([
    ['is cut off', () => zipOf([{ path: 'a.csv', bytes: csv }]).subarray(0, -30), 'archive-unreadable'],
    ['holds nothing', () => zipOf([]), 'archive-empty'],
    [
      'holds too many files',
      () => zipOf(Array.from({ length: 1001 }, (_, n) => ({ path: `${n}`, bytes: csv.subarray(0, 9) }))),
      'archive-too-many',
    ],
    [
      'is a spreadsheet',
      () =>
        zipOf([
          { path: '[Content_Types].xml', bytes: csv },
          { path: 'xl/a.xml', bytes: csv },
        ]),
      'not-a-capture',
    ],
  ])('are refused whole when one %s', async (_what, make, code) => {
    expect(await sent(make(), 422)).toMatchObject({ code });
  });

  it('have their own route: told apart by content, not by name', async () => {
    const archive = zipOf([{ path: 'a.csv', bytes: csv }]);
    const wrong = await technician
      .post(`${base}/recordings`)
      .attach('file', archive, 'capture.csv')
      .expect(400);
    expect(wrong.body).toMatchObject({ code: 'archive' });
    expect(wrong.body.detail).toContain('/archives');
    const single = await technician.post(`${base}/archives`).attach('file', csv, 'bench.zip').expect(400);
    expect(single.body).toMatchObject({ code: 'not-an-archive' });
    await technician.post(`${base}/archives`).field('remark', 'no file').expect(400);
    await technician.post(`${base}/recordings`).attach('file', Buffer.from('PK'), 'short.csv').expect(202);
  });

  it('come by resumable upload as well, once however often they are finished', async () => {
    const cookie = await sessionCookie(test.database, test.people.technician.id);
    const { port } = test.http.address() as AddressInfo;
    const archive = zipOf([
      { path: 'a.csv', bytes: csv },
      { path: 'b/a.csv', bytes: wav },
      { path: '../c', bytes: csv },
    ]);
    const endpoint = `http://127.0.0.1:${port}${base}/uploads`;
    const path = new URL(await sendByTus(archive, { endpoint, cookie, fileName: 'x' })).pathname;
    const finish = () =>
      technician
        .post(`${path}/recordings`)
        .send({ sha256: sha256(archive), name: 'not for all' })
        .expect(202);
    const [first, second] = await Promise.all([finish(), finish()]);
    expect(first.body.leftOut).toMatchObject([{ path: '../c' }]);
    expect(first.body.items.map(({ name }: Recording) => name)).toEqual(['a', 'a']);
    const ids = ({ body }: typeof first) => body.items.map(({ id }: Recording) => id);
    expect(ids(second)).toEqual(ids(first));
    expect(ids(await finish())).toEqual(ids(first));
  });

  it.runIf(kind === 'disk')('end cleanly when who sent them goes away', { timeout: 60_000 }, async () => {
    const cookie = await sessionCookie(test.database, test.people.technician.id);
    const { port } = test.http.address() as AddressInfo;
    const big = Buffer.alloc(MiB, csv);
    const archive = zipOf(
      Array.from({ length: 40 }, (_, n) => ({
        path: `gone-${n}.csv`,
        bytes: Buffer.concat([Buffer.from(`${n}\n`), big]),
      })),
    );
    const endpoint = `http://127.0.0.1:${port}${base}/uploads`;
    const path = new URL(await sendByTus(archive, { endpoint, cookie, fileName: 'x' })).pathname;
    const headers = { cookie, 'content-type': 'application/json', 'content-length': 2 };
    const request = httpRequest({ port, path: `${path}/recordings`, method: 'POST', headers });
    const gone = once(request, 'error');
    request.end('{}');
    const count = async () =>
      (await technician.get(`${base}/recordings?q=gone-&limit=100`).expect(200)).body.items.length as number;
    await expect.poll(count, { timeout: 20_000, interval: 20 }).toBeGreaterThan(0);
    request.destroy();
    await gone;
    await wait(1500);
    const received = await count();
    expect(received).toBeLessThan(40);
    expect(await readdir(join(test.app.get(AppConfig).dataDir, 'storage', '.part'))).toEqual([]);
    await wait(500);
    expect(await count()).toBe(received);
    const { body } = await technician.post(`${path}/recordings`).send({}).expect(202);
    expect(body.items).toHaveLength(40);
    expect(await count()).toBe(40);
  });
});
