import { reportCheckSchema, reportSchema, type Report } from '@overtally/contracts';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newIssued, newJudged, type Judged } from './support/judged-reports.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let dimmer: Judged;
let first: Report;
beforeAll(async () => {
  test = await startTestApp({ PUBLIC_URL: 'https://lab.example', TRUST_PROXY: '1' });
  dimmer = await newJudged(test);
  first = await newIssued(test, [dimmer.verdict.id]);
});
afterAll(() => test.close());

let lastAddress = 0;
/** A check by somebody who is not signed in, from an address that has not asked before. */
const check = (number: string, code: string, address = `203.0.113.${(lastAddress += 1)}`) =>
  supertest(test.http)
    .get(`/api/report-checks/${encodeURIComponent(number)}/${encodeURIComponent(code)}`)
    .set('X-Forwarded-For', address);

describe('the public check of a report', () => {
  it('tells revision, date, state and digest of what was issued, and nothing else', async () => {
    const { body } = await check(first.number!, first.checkCode!).expect(200);
    expect(reportCheckSchema.strict().parse(body)).toEqual({
      number: first.number,
      revision: 0,
      issuedAt: first.issuedAt,
      state: 'current',
      newest: null,
      pdfSha256: first.pdfSha256,
    });
    expect(first.checkUrl).toBe(`https://lab.example/check/${first.number}/${first.checkCode}`);
  });

  // D. Crockford, Base 32: O reads as 0, I and L as 1, case and hyphens do not matter; 16 digits carry 80 bits.
  it('takes the code as people type it', async () => {
    expect(first.checkCode).toMatch(/^([0-9A-HJKMNP-TV-Z]{4}-){3}[0-9A-HJKMNP-TV-Z]{4}$/);
    const code = first.checkCode!;
    const typed = [
      code.toLowerCase(),
      code.replaceAll('-', ''),
      code.replaceAll('-', ' ').replaceAll('0', 'o').replaceAll('1', 'l'),
      code.replaceAll('0', 'O').replaceAll('1', 'I'),
    ];
    for (const each of typed) await check(first.number!, each).expect(200);
    await check(first.number!.toLowerCase(), code).expect(200);
    await check('hr 1', code).expect(200);
  });

  it('answers alike whatever is wrong: number, code, form, or a report that is not issued', async () => {
    const other = await newIssued(test, [dimmer.verdict.id]);
    const wrong = [
      ['HR-9999', first.checkCode!],
      [other.number!, first.checkCode!],
      [first.number!, 'ZZZZ-ZZZZ-ZZZZ-ZZZZ'],
      [first.number!, 'short'],
      ['nonsense', "' or 1=1 --"],
      ['HR-99999999999999999999', first.checkCode!],
    ] as const;
    const answers = [];
    for (const [number, code] of wrong) {
      const { instance: _, ...body } = (await check(number, code).expect(404)).body;
      answers.push(JSON.stringify(body));
    }
    expect(new Set(answers).size).toBe(1);
  });

  it('names the revision that counts now, once there is a newer one', async () => {
    const manager = await test.signIn('manager');
    const analyst = await test.signIn('analyst');
    const { body: draft } = await analyst.post(`/api/reports/${first.id}/revise`).expect(201);
    const before = await check(first.number!, first.checkCode!).expect(200);
    expect(before.body).toMatchObject({ state: 'current', newest: null });
    const revisionReason = 'The rated power was wrong';
    await analyst.post(`/api/reports/${draft.id}/submit`).send({ revisionReason }).expect(200);
    const issued = await manager.post(`/api/reports/${draft.id}/issue`).send({}).expect(200);
    const second = reportSchema.parse(issued.body);
    const { body } = await check(first.number!, first.checkCode!).expect(200);
    expect(body).toMatchObject({
      ...{ revision: 0, state: 'superseded', pdfSha256: first.pdfSha256 },
      newest: { revision: 1, issuedAt: second.issuedAt },
    });
    const now = await check(second.number!, second.checkCode!).expect(200);
    expect(now.body).toMatchObject({ revision: 1, state: 'current', newest: null });
  });

  it('bounds how often one address asks, hit or miss', async () => {
    const statuses: number[] = [];
    for (let count = 0; count < 30; count += 1) {
      const code = count % 2 ? first.checkCode! : 'ZZZZ-ZZZZ-ZZZZ-ZZZZ';
      statuses.push((await check(first.number!, code, '198.51.100.7')).status);
    }
    expect(new Set(statuses)).toEqual(new Set([200, 404]));
    const refused = await check(first.number!, first.checkCode!, '198.51.100.7').expect(429);
    expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
    expect(refused.body.code).toBe('too-many-checks');
    await check(first.number!, first.checkCode!, '198.51.100.8').expect(200);
  });
});
