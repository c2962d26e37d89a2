/**
 * A pattern that fits files of the same kind: what counts on (numbers, dates) becomes `*`. A name without a number
 * keeps its first words: `bench-square.csv` gives `bench-*.csv`.
 */
export function suggestPattern(fileName: string): string {
  const dot = fileName.lastIndexOf('.');
  const stem = dot > 0 ? fileName.slice(0, dot) : fileName;
  const ending = dot > 0 ? fileName.slice(dot) : '';
  const counted = stem.replace(/\d+([-_.:, T]*\d+)*/g, '*');
  if (counted !== stem) return counted.replace(/\*+/g, '*') + ending;
  const kind = /^(.*[-_ ])[^-_ ]+$/.exec(stem)?.[1] ?? stem;
  return `${kind}*${ending}`;
}

/** A name for a rule from its pattern: `bench-*.csv` gives “bench, CSV”. */
export function suggestName(pattern: string): string {
  const dot = pattern.lastIndexOf('.');
  const stem = (dot > 0 ? pattern.slice(0, dot) : pattern).replace(/[*?\-_ ]+/g, ' ').trim();
  const kind = dot > 0 ? pattern.slice(dot + 1).toUpperCase() : '';
  return [stem, kind].filter(Boolean).join(', ').slice(0, 80);
}
