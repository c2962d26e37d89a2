import { bandLimitedSquareCsv, demoCapturePath } from '@overtally/fixtures';
import { copyFileSync, mkdirSync, mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { crc32 } from 'node:zlib';

/** Ten seconds of a sine of 50 Hz as CSV, about 1.7 MB. Another `seed` gives another file of the same name. */
export function longCsv(seed = 1): { path: string; name: string } {
  const rows = Array.from({ length: 100_000 }, (_, i) => {
    const timeS = i / 10_000;
    return `${timeS.toFixed(4)},${(325 * Math.sin(2 * Math.PI * 50 * timeS + seed)).toFixed(4)}`;
  });
  const path = join(mkdtempSync(join(tmpdir(), 'overtally-captures-')), 'long.csv');
  writeFileSync(path, ['Time [s],U [V]', ...rows, ''].join('\n'));
  return { path, name: 'long' };
}

/** A folder with a COMTRADE record of two files, an archive of two captures and half a record, and what nobody wants. */
export function folderOfCaptures(): string {
  const folder = join(mkdtempSync(join(tmpdir(), 'overtally-captures-')), 'monday');
  const readers = join(dirname(demoCapturePath('supply-check.csv')), '../readers');
  mkdirSync(join(folder, 'plant'), { recursive: true });
  for (const kind of ['cfg', 'dat'])
    copyFileSync(join(readers, `comtrade-pair-1999.${kind}`), join(folder, 'plant', `plant.${kind}`));
  const square = bandLimitedSquareCsv({});
  writeFileSync(
    join(folder, 'bench.zip'),
    storedZip({
      'a/one.csv': square.text,
      'two.csv': `${square.text}\n`,
      'lone.cfg': readFileSync(join(readers, 'comtrade-pair-1999.cfg')),
    }),
  );
  writeFileSync(join(folder, 'single.csv'), square.text);
  writeFileSync(join(folder, '.DS_Store'), 'x');
  writeFileSync(join(folder, 'plant', '.hidden.csv'), square.text);
  return folder;
}

/** A ZIP archive whose members are stored as they are (PKWARE APPNOTE, 4.3). */
function storedZip(members: Record<string, string | Buffer>): Buffer {
  const local: Buffer[] = [];
  const central: Buffer[] = [];
  let offset = 0;
  for (const [name, content] of Object.entries(members)) {
    const [path, data] = [Buffer.from(name), Buffer.from(content)];
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt16LE(0x21, 8);
    common.writeUInt32LE(crc32(data), 10);
    common.writeUInt32LE(data.length, 14);
    common.writeUInt32LE(data.length, 18);
    common.writeUInt16LE(path.length, 22);
    const entry = Buffer.alloc(14);
    entry.writeUInt32LE(offset, 10);
    local.push(Buffer.from('PK\x03\x04', 'latin1'), common, path, data);
    central.push(Buffer.from('PK\x01\x02\x14\x00', 'latin1'), common, entry, path);
    offset += 30 + path.length + data.length;
  }
  const directory = Buffer.concat(central);
  const end = Buffer.alloc(18);
  const count = Object.keys(members).length;
  end.writeUInt16LE(count, 4);
  end.writeUInt16LE(count, 6);
  end.writeUInt32LE(directory.length, 8);
  end.writeUInt32LE(offset, 12);
  return Buffer.concat([...local, directory, Buffer.from('PK\x05\x06', 'latin1'), end]);
}
