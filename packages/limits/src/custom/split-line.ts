/** A cell of a line, without its quotes and outer spaces; `column` counts characters from 1. */
export interface Cell {
  text: string;
  column: number;
}

/** What parts the cells: tab, else semicolon, else comma. */
function separatorOf(line: string): string {
  if (line.includes('\t')) return '\t';
  return line.includes(';') ? ';' : ',';
}

/** Parts at the separator outside of quotes. */
function parts(line: string, separator: string): { raw: string; at: number }[] {
  const found: { raw: string; at: number }[] = [];
  let start = 0;
  let quoted = false;
  for (let i = 0; i <= line.length; i++) {
    if (line[i] === '"') quoted = !quoted;
    if (i < line.length && (quoted || line[i] !== separator)) continue;
    found.push({ raw: line.slice(start, i), at: start });
    start = i + 1;
  }
  return found;
}

/** A text with points in place of commas between digits. */
export const decimalPoints = (text: string): string => text.replace(/(\d),(\d)/g, '$1.$2');

function cellOf({ raw, at }: { raw: string; at: number }, decimalComma: boolean): Cell {
  const leading = raw.length - raw.trimStart().length;
  const trimmed = raw.trim();
  const isQuoted = trimmed.length > 1 && trimmed.startsWith('"') && trimmed.endsWith('"');
  const bare = isQuoted ? trimmed.slice(1, -1).replace(/""/g, '"').trim() : trimmed;
  const text = decimalComma || isQuoted ? decimalPoints(bare) : bare;
  return { text, column: at + leading + (isQuoted ? 2 : 1) };
}

/**
 * Cells of a line of a limit table, each with its place. A colon after the orders parts like the separator:
 * `15-39 odd: 0.15*15/n`. With tab or semicolon, and in quotes, a comma between digits is a decimal point.
 */
export function splitLine(line: string): Cell[] {
  const separator = separatorOf(line);
  const decimalComma = separator !== ',';
  return parts(line, separator).flatMap((part, index) => {
    const colon = index === 0 ? part.raw.indexOf(':') : -1;
    if (colon === -1) return [cellOf(part, decimalComma)];
    const after = { raw: part.raw.slice(colon + 1), at: part.at + colon + 1 };
    return [
      cellOf({ raw: part.raw.slice(0, colon), at: part.at }, decimalComma),
      cellOf(after, decimalComma),
    ];
  });
}
