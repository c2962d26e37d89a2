/**
 * Which part of the product may import what. Arrows go one way:
 * web -> contracts, dsp, limits, the joining of COMTRADE pairs; api -> contracts, db, ingest, dsp, limits; cases, bench -> dsp, ingest; packages never
 * import apps.
 */
import { readdirSync } from 'node:fs';
import { join } from 'node:path';

/** Tests may read files and use test libraries; what they import is not shipped. */
export const testFiles = ['**/*.spec.{ts,tsx}', '**/test/**', '**/e2e/**', '**/testing/**', '**/vitest*.ts'];

/**
 * @typedef {object} Room
 * @property {string} folder
 * @property {string[]} ours the packages of the workspace it may import
 * @property {string[]} [typesOnly] those of `ours` that may only be imported as types
 * @property {string[]} [onlyOutside] the only outside modules it may import; all declared ones by default
 * @property {string[]} [forbidden] outside modules it may not import
 */

const fileAndNetwork = ['fs', 'fs/promises', 'net', 'http', 'https', 'child_process', 'worker_threads'];

/** @type {Room[]} */
const rooms = [
  { folder: 'packages/contracts', ours: [], onlyOutside: ['zod'] },
  { folder: 'packages/dsp', ours: [], onlyOutside: ['fft.js'] },
  { folder: 'packages/limits', ours: ['contracts'], typesOnly: ['contracts'], onlyOutside: [] },
  { folder: 'packages/ingest', ours: ['contracts'], typesOnly: ['contracts'], forbidden: fileAndNetwork },
  { folder: 'packages/cases', ours: ['dsp', 'ingest'] },
  { folder: 'db', ours: ['contracts'] },
  { folder: 'fixtures', ours: [] },
  {
    folder: 'apps/web',
    ours: ['contracts', 'dsp', 'limits', 'ingest/comtrade-pair'],
    forbidden: ['pg', 'drizzle-orm'],
  },
  { folder: 'apps/api', ours: ['contracts', 'db', 'ingest', 'dsp', 'limits'] },
];

/** Where a room may import more than the rest of it. */
const exceptions = [
  { folder: 'apps/api/src/demo', ours: ['contracts', 'db', 'ingest', 'dsp', 'limits', 'fixtures'] },
];

/**
 * A pattern for `no-restricted-imports`: everything of ours that is not listed, deep paths included.
 * @param {string[]} names
 */
const othersOfOurs = (names) => `^@overtally/(?!(?:${['-', ...names].join('|')})$)`;

/** @param {string} text */
const escaped = (text) => text.replace(/[.*+?^${}()|[\]\\/]/g, '\\$&');

/**
 * @param {Room} room
 * @returns {object[]} the patterns that shipped code of the room must not import
 */
function patternsOf({ folder, ours, typesOnly = [], onlyOutside, forbidden = [] }) {
  const message = `${folder} may import of ours: ${ours.join(', ') || 'nothing'}; never a path inside a package.`;
  /** @type {{ regex: string, message: string, allowTypeImports?: boolean }[]} */
  const patterns = [{ regex: othersOfOurs(ours), message }];
  if (typesOnly.length > 0) {
    const regex = `^@overtally/(?:${typesOnly.join('|')})$`;
    patterns.push({ regex, allowTypeImports: true, message: `${folder} takes types alone from it.` });
  }
  if (onlyOutside !== undefined) {
    const allowed = ['\\.{1,2}/', '@overtally/', ...onlyOutside.map((name) => `${escaped(name)}$`)];
    const names = onlyOutside.join(', ') || 'nothing';
    patterns.push({
      regex: `^(?!${allowed.join('|')})`,
      message: `${folder} is pure; from outside it may import ${names}.`,
    });
  }
  if (forbidden.length > 0) {
    patterns.push({
      regex: `^(?:node:)?(?:${forbidden.map(escaped).join('|')})$`,
      message: `${folder} does no such work.`,
    });
  }
  return patterns;
}

/**
 * @param {string} name
 * @param {string[]} files
 * @param {object[]} patterns
 */
const restriction = (name, files, patterns) => ({
  name: `imports of ${name}`,
  files,
  rules: { '@typescript-eslint/no-restricted-imports': ['error', { patterns }] },
});

/** @returns {object[]} ESLint configurations that hold the direction between the packages */
export function packageDirection() {
  const shipped = [...rooms, ...exceptions].map((room) =>
    restriction(room.folder, [`${room.folder}/**/*.{ts,tsx}`], patternsOf(room)),
  );
  const tests = rooms.map(({ folder, ours }) =>
    restriction(
      `${folder} in tests`,
      testFiles.map((pattern) => `${folder}/${pattern}`),
      patternsOf({ folder, ours: [...ours, 'fixtures'] }),
    ),
  );
  return [...shipped, ...tests];
}

/**
 * Zones inside the web application, made from its list of features, so that a new one is covered.
 * @param {string} root the top folder of the checkout
 * @returns {object[]} zones of import-x/no-restricted-paths
 */
export function zones(root) {
  const web = 'apps/web/src';
  const features = readdirSync(join(root, web, 'features'), { withFileTypes: true })
    .filter((entry) => entry.isDirectory())
    .map(({ name }) => name);
  return [
    ...features.map((name) => ({
      target: `${web}/features/${name}`,
      from: `${web}/features`,
      except: [`./${name}`],
      message: 'Features do not import each other; app/ composes them.',
    })),
    {
      target: `${web}/features`,
      from: `${web}/app`,
      except: ['./paths.ts'],
      message: 'A feature knows the addresses of pages, nothing else of the application.',
    },
    {
      target: `${web}/components`,
      from: [`${web}/features`, `${web}/app`],
      message: 'Shared pieces know no feature.',
    },
    {
      target: `${web}/lib`,
      from: ['features', 'app', 'components'].map((name) => `${web}/${name}`),
      message: 'lib is the ground floor.',
    },
    { target: ['packages', 'db', 'fixtures'], from: 'apps', message: 'Packages never import applications.' },
    { target: 'apps/web', from: 'apps/api', message: 'The web knows the API by its contract alone.' },
    { target: 'apps/api', from: 'apps/web', message: 'The API does not know the web.' },
  ];
}
