import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readRecording } from '../read-recording.js';
import { planCsv } from './plan.js';
import { PlainRows } from './plain-rows.js';

const digits = fc.string({ unit: fc.constantFrom(...'0123456789'), minLength: 1, maxLength: 21 });
const sign = fc.constantFrom('', '-', '+');

/** Numerals of any size, up to subnormal numbers and beyond the range, with marks and signs in all places. */
const numeral = fc.oneof(
  fc.double({ noNaN: true, noDefaultInfinity: true }).map(String),
  fc
    .tuple(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.nat(20))
    .map(([x, n]) => x.toExponential(n)),
  fc.tuple(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.nat(12)).map(([x, n]) => x.toFixed(n)),
  fc.tuple(sign, digits, digits).map(([s, a, b]) => `${s}${a}.${b}`),
  fc.tuple(sign, digits).map(([s, a]) => `${s}${a}`),
  fc.tuple(sign, digits).map(([s, a]) => `${s}.${a}`),
  fc.tuple(sign, digits).map(([s, a]) => `${s}${a}.`),
  fc
    .tuple(sign, digits, digits, sign, fc.integer({ min: 0, max: 340 }))
    .map(([s, a, b, t, e]) => `${s}${a}.${b}e${t}${e}`),
);

/** Value that a table keeps: numbers beyond the range of a double are missing. */
const kept = (text: string) => (Number.isFinite(Number(text)) ? Number(text) : NaN);

function plainRows(text: string, capacity = 64): PlainRows {
  const plan = planCsv(text, 'utf-8', true, { fileName: 'a.csv', options: { sampleRateHz: 1000 } });
  const rows = PlainRows.create(plan.layout, plan.channels, capacity);
  if (rows === null) throw new Error('the kernel does not run here');
  return rows;
}

/** Reads `body` under the layout of a table that begins with `head`. */
function readBody(head: string, body: string) {
  const rows = plainRows(head);
  const bytes = new TextEncoder().encode(body);
  rows.begin(bytes);
  const count = rows.read(0, bytes.length, 0, NaN);
  return { count, next: rows.next, values: rows.blocks.map((block) => [...block.subarray(0, count)]) };
}

// Independent reference: Number(), whose result ECMA-262 defines as the correctly rounded value.
describe('plain rows', { timeout: 30_000 }, () => {
  it('hold exactly the double nearest to any numeral, whoever reads it', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(numeral, { minLength: 2, maxLength: 40 }), async (numerals) => {
        const body = numerals.map((text, i) => `${i},${text},1\n`).join('');
        const read: number[] = [];
        const outcome = await readRecording(
          inOne(`t [s],u [V],i [A]\n0.5,0,0\n${body.replace(/^0,/, '0.7,')}`),
          {
            fileName: 'a.csv',
            sink: {
              begin: () => undefined,
              write: (index, samples) => void (index === 0 && read.push(...samples)),
            },
          },
        );
        expect(outcome).toMatchObject({ ok: true });
        expect(read).toEqual([0, ...numerals.map(kept)]);
      }),
      { seed: 4, numRuns: 150 },
    );
  });

  it('are read by the kernel where the mantissa is below 2^53 and the power of ten within 10^22', () => {
    const safe = fc.tuple(sign, fc.maxSafeNat(), fc.nat(22));
    fc.assert(
      fc.property(fc.array(safe, { minLength: 1, maxLength: 64 }), (parts) => {
        const texts = parts.map(([s, mantissa, point]) => {
          const letters = String(mantissa).padStart(point + 1, '0');
          return `${s}${letters.slice(0, letters.length - point)}.${letters.slice(letters.length - point)}`;
        });
        const { values } = readBody('u\n1\n2\n', texts.map((text) => `${text}\n`).join(''));
        expect(values).toEqual([texts.map(Number)]);
      }),
      { seed: 5, numRuns: 1000 },
    );
  });

  it.each([
    ['a blank cell', '1,2\n3,\n', 4],
    ['a word', '1,2\n3,n/a\n', 4],
    ['a quote', '1,2\n"3",4\n', 4],
    ['a cell too few', '1,2\n3\n', 4],
    ['a cell too many', '1,2\n3,4,5\n', 4],
    ['a thousands mark', "1,2\n1'000,4\n", 4],
    ['a mantissa of 2^53 + 1', '1,2\n3,9007199254740993\n', 4],
    ['a cut line', '1,2\n3,4', 4],
    ['a lone CR', '1,2\r\n3,4\r5,6\n', 5],
    ['a line of nothing', '1,2\n\n3,4\n', 4],
  ])('end before %s', (_, body, next) => {
    expect(readBody('u,i\n1,2\n3,4\n', body)).toEqual({ count: 1, next, values: [[1], [2]] });
  });

  it('may hold blanks, CRLF, exponents, bare marks and signs', () => {
    const body = ' 1 ,\t2.5e3\r\n+.5,-4.\n  -0,1E-2 \n';
    expect(readBody('u,i\n1,2\n3,4\n', body).values).toEqual([
      [1, 0.5, -0],
      [2500, -4, 0.01],
    ]);
  });

  it('may be delimited by runs of blanks, and marked by commas', () => {
    expect(readBody('u i\n1 2\n3 4\n5 6\n', '  1   2 \n3\t4\n').values).toEqual([
      [1, 3],
      [2, 4],
    ]);
    expect(readBody('u;i\n1,5;2,5\n3,5;4,5\n', '1,25;2,5\n3;-4,5\n5,;6\n').values).toEqual([
      [1.25, 3],
      [2.5, -4.5],
    ]);
  });

  it('end where the time does not rise', () => {
    const head = 't [s],u [V]\n0,1\n1,2\n2,3\n';
    const rows = plainRows(head);
    const bytes = new TextEncoder().encode('3,1\n4,2\n4,3\n');
    rows.begin(bytes);
    expect(rows.read(0, bytes.length, 0, 2)).toBe(2);
    expect([rows.next, [...rows.stamps.subarray(0, 2)]]).toEqual([8, [3, 4]]);
    expect(rows.read(8, bytes.length, 2, 4)).toBe(0);
  });
});

async function* inOne(text: string): AsyncGenerator<Uint8Array> {
  yield new TextEncoder().encode(text);
}
