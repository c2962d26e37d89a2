const units = ['bytes', 'KiB', 'MiB', 'GiB', 'TiB'];

/** A number of bytes for people, in binary units (IEC 80000-13): `1.5 GiB`. */
export function bytesInWords(bytes: number): string {
  const power = bytes < 1024 ? 0 : Math.min(units.length - 1, Math.floor(Math.log2(bytes) / 10));
  const value = bytes / 1024 ** power;
  return `${Number(value.toFixed(value < 10 ? 2 : 1))} ${units[power]}`;
}
