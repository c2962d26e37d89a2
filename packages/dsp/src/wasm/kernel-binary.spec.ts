import asc from 'assemblyscript/asc';
import { describe, expect, it } from 'vitest';
import { decodeBase64 } from './base64.js';
import { kernelBinary } from './kernel-binary.js';

const OPTIONS = ['-O3', '--enable', 'simd', '--runtime', 'stub', '--noAssert', '--initialMemory', '1'];
const PACKAGE = new URL('../..', import.meta.url).pathname;

describe('kernelBinary', () => {
  // `pnpm --filter @overtally/dsp assemble` writes the module anew after a change of assembly/.
  it('is what the source gives', async () => {
    const written = new Map<string, Uint8Array>();
    const report = asc.createMemoryStream();
    const { error } = await asc.main(
      ['assembly/index.ts', '--outFile', 'kernels.wasm', '--baseDir', PACKAGE, ...OPTIONS],
      { stderr: report, writeFile: (name, contents) => void written.set(name, Buffer.from(contents)) },
    );
    expect(error, report.toString()).toBeNull();
    const text = Buffer.from(written.get('kernels.wasm')!).toString('base64');
    await expect(moduleText(text)).toMatchFileSnapshot('kernel-binary.ts');
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

function moduleText(base64: string): string {
  return `/** assembly/ compiled to WebAssembly (base64). Made by \`pnpm --filter @overtally/dsp assemble\`. */
export const kernelBinary =
  '${base64}';
`;
}
