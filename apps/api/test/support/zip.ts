import { crc32, deflateRawSync } from 'node:zlib';

export interface ZipEntry {
  path: string;
  bytes: Buffer;
  /** 0: stored, 8: deflated. */
  method?: number;
  /** General purpose bit flag; bit 0 tells encryption. */
  flags?: number;
  /** Unix mode, as an archive made on UNIX keeps it. */
  mode?: number;
  /** What the headers tell in place of the truth. */
  told?: { uncompressedSize?: number; compressedSize?: number; crc32?: number; offset?: number };
}

/** A ZIP archive after PKWARE's APPNOTE 6.3, 4.3.7, 4.3.12 and 4.3.16, or one that lies as `told` says. */
export function zipOf(entries: readonly ZipEntry[]): Buffer {
  const parts: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const { path, bytes, method = 8, flags = 0x800, mode, told = {} } of entries) {
    const name = Buffer.from(path);
    const packed = method === 8 ? deflateRawSync(bytes) : bytes;
    const fields = Buffer.alloc(26);
    fields.writeUInt16LE(20, 0);
    fields.writeUInt16LE(flags, 2);
    fields.writeUInt16LE(method, 4);
    fields.writeUInt16LE(0x21, 8);
    fields.writeUInt32LE(told.crc32 ?? crc32(bytes), 10);
    fields.writeUInt32LE(told.compressedSize ?? packed.length, 14);
    fields.writeUInt32LE(told.uncompressedSize ?? bytes.length, 18);
    fields.writeUInt16LE(name.length, 22);
    parts.push(Buffer.from('PK\u0003\u0004'), fields, name, packed);
    const rest = Buffer.alloc(14);
    rest.writeUInt32LE(((mode ?? 0) << 16) >>> 0, 6);
    rest.writeUInt32LE(told.offset ?? offset, 10);
    const madeBy = Buffer.from([20, mode === undefined ? 0 : 3]);
    directory.push(Buffer.from('PK\u0001\u0002'), madeBy, fields, rest, name);
    offset += 4 + fields.length + name.length + packed.length;
  }
  const end = Buffer.alloc(18);
  end.writeUInt16LE(entries.length, 4);
  end.writeUInt16LE(entries.length, 6);
  end.writeUInt32LE(Buffer.concat(directory).length, 8);
  end.writeUInt32LE(offset, 12);
  return Buffer.concat([...parts, ...directory, Buffer.from('PK\u0005\u0006'), end]);
}
