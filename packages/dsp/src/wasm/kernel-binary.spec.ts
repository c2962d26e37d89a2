import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { decodeBase64 } from './base64.js';
import { kernelBinary } from './kernel-binary.js';

const OPTIONS = ['-O3', '--enable', 'simd', '--runtime', 'stub', '--noAssert', '--initialMemory', '1'];
const PACKAGE = new URL('../..', import.meta.url).pathname;
/** Run as a program, since the compiler's types would declare its own Array and numbers for all of the package. */
const COMPILER = createRequire(import.meta.url).resolve('assemblyscript/bin/asc.js');

describe('kernelBinary', () => {
  // `pnpm --filter @overtally/dsp assemble` writes the module anew after a change of assembly/.
  it('is what the source gives', async () => {
    await expect(moduleText(compile().toString('base64'))).toMatchFileSnapshot('kernel-binary.ts');
  });

  it('is decoded to the same bytes as by Node.js', () => {
    expect(Buffer.from(decodeBase64(kernelBinary)).equals(Buffer.from(kernelBinary, 'base64'))).toBe(true);
  });

  // Test vectors of RFC 4648, section 10.
  it.each([
    ['', ''],
    ['Zg==', 'f'],
    ['Zm8=', 'fo'],
    ['Zm9v', 'foo'],
    ['Zm9vYg==', 'foob'],
    ['Zm9vYmE=', 'fooba'],
    ['Zm9vYmFy', 'foobar'],
  ])('decodes %s', (text, plain) => {
    expect(String.fromCharCode(...decodeBase64(text))).toBe(plain);
  });
});

function compile(): Buffer {
  const folder = mkdtempSync(join(tmpdir(), 'kernels-'));
  try {
    const outFile = join(folder, 'kernels.wasm');
    execFileSync(process.execPath, [COMPILER, 'assembly/index.ts', '--outFile', outFile, ...OPTIONS], {
      cwd: PACKAGE,
      stdio: ['ignore', 'ignore', 'pipe'],
    });
    return readFileSync(outFile);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function moduleText(base64: string): string {
  return `/** assembly/ compiled to WebAssembly (base64). Made by \`pnpm --filter @overtally/dsp assemble\`. */
export const kernelBinary =
  '${base64}';
`;
}
