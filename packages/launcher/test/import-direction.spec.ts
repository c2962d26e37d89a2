/** The import rules of the house report what they forbid, and let pass what they allow. */
import { readdirSync } from 'node:fs';
import { ESLint } from 'eslint';
import tseslint from 'typescript-eslint';
import { beforeAll, describe, expect, it } from 'vitest';
import { root } from './tree.js';

const [feature = '', otherFeature = ''] = readdirSync(`${root}/apps/web/src/features`).filter(
  (name) => sources(name).length > 0,
);
const directionRules = [
  '@typescript-eslint/no-restricted-imports',
  'import-x/no-restricted-paths',
  'import-x/no-relative-packages',
  'no-restricted-globals',
  'no-restricted-properties',
];

let eslint: ESLint;
beforeAll(() => {
  // Rules that need types want files that exist; the direction is decided without types.
  const withoutTypes = { files: ['**/*.{ts,tsx}'], ...tseslint.configs.disableTypeChecked };
  eslint = new ESLint({ cwd: root, overrideConfig: [withoutTypes] as ESLint.Options['overrideConfig'] });
});

/** The direction rules that object to a file of this content. */
async function objections(filePath: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(code, { filePath: `${root}/${filePath}` });
  return (result?.messages ?? [])
    .map(({ ruleId }) => ruleId ?? 'parse error')
    .filter((id) => directionRules.includes(id));
}

/** Any file of a feature, as seen from another feature. */
function moduleOf(name: string): string {
  return `../${name}/${(sources(name)[0] ?? '').replace(/\.tsx?$/, '.js')}`;
}

function sources(name: string): string[] {
  const folder = `${root}/apps/web/src/features/${name}`;
  return readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((file) => /\.tsx?$/.test(file));
}

describe('what must not be imported is reported', () => {
  it.each([
    ['packages/dsp/src/x.ts', "import 'node:fs';"],
    ['packages/dsp/src/x.ts', "import 'fs';"],
    ['packages/dsp/src/x.ts', "import { channelSchema } from '@overtally/contracts';"],
    ['packages/dsp/src/x.ts', 'export const now = () => Date.now();'],
    ['packages/dsp/src/x.ts', 'export const noise = () => Math.random();'],
    ['packages/dsp/src/x.ts', 'export const width = () => window.innerWidth;'],
    ['packages/limits/src/x.ts', "import { channelSchema } from '@overtally/contracts';"],
    ['packages/limits/src/x.ts', "import { z } from 'zod';"],
    ['packages/contracts/src/x.ts', "import 'pg';"],
    ['packages/ingest/src/x.ts', "import { open } from 'node:fs/promises';"],
    ['packages/ingest/src/x.ts', "import { fft } from '@overtally/dsp';"],
    ['packages/ingest/src/x.ts', "import { readAll } from '../../dsp/src/index.js';"],
    ['packages/ingest/src/x.ts', "import { AppModule } from '../../../apps/api/src/app.module.js';"],
    ['packages/cases/src/x.ts', "import { client } from '@overtally/db';"],
    ['db/src/x.ts', "import { evaluate } from '@overtally/limits';"],
    ['apps/web/src/x.ts', "import { client } from '@overtally/db';"],
    ['apps/web/src/x.ts', "import { readRecording } from '@overtally/ingest';"],
    ['apps/web/src/x.ts', "import { bin } from '@overtally/dsp/dist/bin.js';"],
    ['apps/api/src/x.ts', "import { demoPeople } from '@overtally/fixtures';"],
    [`apps/web/src/features/${feature}/x.ts`, `import '${moduleOf(otherFeature)}';`],
    ['apps/web/src/components/x.ts', `import '${moduleOf(feature).replace('../', '../features/')}';`],
  ])('%s: %s', async (file, code) => {
    expect(await objections(file, code)).not.toEqual([]);
  });
});

describe('what may be imported passes', () => {
  it.each([
    ['packages/dsp/src/x.ts', "import FFT from 'fft.js';\nimport { window } from './windows/hann.js';"],
    ['packages/dsp/src/x.spec.ts', "import { readFileSync } from 'node:fs';"],
    ['packages/limits/src/x.ts', "import type { Verdict } from '@overtally/contracts';"],
    ['packages/contracts/src/x.ts', "import { z } from 'zod';"],
    ['packages/cases/src/x.ts', "import { readRecording } from '@overtally/ingest';"],
    ['apps/web/src/x.ts', "import { predict } from '@overtally/dsp';"],
    ['apps/web/src/x.ts', "import { joinComtradePair } from '@overtally/ingest/comtrade-pair';"],
    ['apps/api/src/demo/x.ts', "import { demoPeople } from '@overtally/fixtures';"],
    [`apps/web/src/features/${feature}/x.ts`, `import '${moduleOf(feature)}';`],
  ])('%s: %s', async (file, code) => {
    expect(await objections(file, code)).toEqual([]);
  });
});
