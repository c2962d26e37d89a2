/**
 * Whether the whole of `fileName` fits `pattern`, in which `*` stands for any text, also none, and `?` for one
 * character; every other character stands for itself, in either case. Only the name behind the last slash or backslash
 * counts. Takes at most the product of both lengths in steps, whatever the pattern: after a mismatch only the last `*`
 * takes one more character, since what the ones before it took need never change.
 */
export function fitsPattern(pattern: string, fileName: string): boolean {
  const wanted = [...pattern.toLowerCase()];
  const given = [...baseName(fileName).toLowerCase()];
  let at = 0;
  let star = -1;
  let starTook = 0;
  for (let i = 0; i < given.length;) {
    if (wanted[at] === '*') {
      star = at;
      starTook = i;
      at += 1;
    } else if (at < wanted.length && (wanted[at] === '?' || wanted[at] === given[i])) {
      at += 1;
      i += 1;
    } else if (star >= 0) {
      starTook += 1;
      i = starTook;
      at = star + 1;
    } else {
      return false;
    }
  }
  while (wanted[at] === '*') at += 1;
  return at === wanted.length;
}

/** How many characters of a pattern stand for themselves. */
export function literalLength(pattern: string): number {
  return [...pattern].filter((character) => character !== '*' && character !== '?').length;
}

function baseName(fileName: string): string {
  return fileName.slice(Math.max(fileName.lastIndexOf('/'), fileName.lastIndexOf('\\')) + 1);
}
