import { joinComtradePair } from '@overtally/ingest/comtrade-pair';
import type { IncomingFile } from '../upload-item.js';

const half = /\.(cfg|dat)$/i;
/** A configuration is read this far to join it: 999 999 channels would not fill it. */
const configurationBytes = 16 * 1024 * 1024;

/** Where a file would have its other half: the same place and name without the kind. null for other files. */
export const pairKey = (path: string): string | null =>
  half.test(path) ? path.replace(half, '').toLowerCase() : null;

/** Name of the other half of a COMTRADE record of two files: plant.dat of plant.cfg. */
export function otherHalf(name: string): string {
  const isConfiguration = /\.cfg$/i.test(name);
  const kind = name.slice(-3) === name.slice(-3).toUpperCase() ? ['CFG', 'DAT'] : ['cfg', 'dat'];
  return name.slice(0, -3) + (isConfiguration ? kind[1] : kind[0]);
}

/**
 * Makes one file of each .cfg and .dat of the same place and name (COMTRADE, IEC 60255-24: the single file .cff),
 * without reading the samples. `held` are halves that came before and wait for the other one.
 */
export async function joinHalves<T extends IncomingFile>(
  files: readonly IncomingFile[],
  held: readonly T[],
): Promise<{ files: IncomingFile[]; used: T[] }> {
  const all = [...files, ...held];
  const joined: IncomingFile[] = [];
  const used = new Set<IncomingFile>();
  for (const cfg of all.filter(({ path }) => /\.cfg$/i.test(path))) {
    const dat = all.find(
      ({ path }) => path !== cfg.path && /\.dat$/i.test(path) && pairKey(path) === pairKey(cfg.path),
    );
    if (!dat || used.has(dat)) continue;
    joined.push(...(await joinOrExplain(cfg, dat)));
    used.add(cfg).add(dat);
  }
  return {
    files: [...files.filter((file) => !used.has(file)), ...joined],
    used: held.filter((file) => used.has(file)),
  };
}

/** The pair as one file, or both halves with what is wrong with them. */
async function joinOrExplain(cfg: IncomingFile, dat: IncomingFile): Promise<IncomingFile[]> {
  try {
    return [await join(cfg, dat)];
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    return [cfg, dat].map(({ file, path }) => ({ file, path, reason }));
  }
}

async function join(cfg: IncomingFile, dat: IncomingFile): Promise<IncomingFile> {
  const head = new Uint8Array(await cfg.file.slice(0, configurationBytes).arrayBuffer());
  const pair = joinComtradePair(
    { name: cfg.file.name, head },
    { name: dat.file.name, sizeBytes: dat.file.size },
  );
  const parts = [new Uint8Array(pair.beforeCfg), cfg.file, new Uint8Array(pair.beforeDat), dat.file];
  // The same pair dropped again is to be known again, so the moment is that of its files.
  const lastModified = Math.max(cfg.file.lastModified, dat.file.lastModified);
  return {
    file: new File(parts, pair.fileName, { lastModified }),
    path: cfg.path.slice(0, cfg.path.length - cfg.file.name.length) + pair.fileName,
    madeOf: [cfg.file.name, dat.file.name],
  };
}
