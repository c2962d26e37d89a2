import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';

const OPTIONS = ['-O3', '--enable', 'simd', '--runtime', 'stub', '--noAssert', '--initialMemory', '1'];
const PACKAGE = new URL('../..', import.meta.url).pathname;
/** Run as a program, since the compiler's types would declare its own Array and numbers for all of the package. */
const COMPILER = createRequire(import.meta.url).resolve('assemblyscript/bin/asc.js');

// `pnpm --filter @overtally/ingest assemble` writes the module anew after a change of assembly/.
it('holds the kernels as the source gives them', { timeout: 120_000 }, async () => {
  const base64 = compile().toString('base64');
  const text = `/** assembly/ compiled to WebAssembly (base64). Made by \`pnpm --filter @overtally/ingest assemble\`. */
export const kernelBinary =
  '${base64}';
`;
  await expect(text).toMatchFileSnapshot('kernel-binary.ts');
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
