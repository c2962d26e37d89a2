import type { PhaseNumber } from './types.js';

export type PowerQuantity = 'voltage' | 'current';

/** A channel as far as its name tells where it belongs. */
export interface ChannelName {
  /** Words of the name in lower case, without the mark of the quantity: `VA_G1` and `IA_G1` both give a, g1. */
  words: string[];
}

/** One way to read a name as one phase of three. */
export interface PhaseReading {
  alphabet: string;
  phase: PhaseNumber;
  /** The words with `#` for the phase; equal for the three phases and for voltage and current of one circuit. */
  stem: string;
  /** Named as measured to neutral, such as `UAN`. */
  toNeutral: boolean;
}

/** Ways of naming three phases that are in use: IEC, American, older German, Indian and British, machine terminals. */
export const LETTER_ALPHABETS = ['abc', 'rst', 'ryb', 'uvw'];
export const DIGITS = '123';

const MARKS: Record<PowerQuantity, string[]> = {
  voltage: ['spannung', 'voltage', 'tension', 'volts', 'volt', 'u', 'v'],
  current: ['current', 'courant', 'ampere', 'strom', 'amps', 'amp', 'i'],
};
const FILLERS = ['phase', 'ph', 'line', 'leg'];
const NEUTRAL = ['n', 'neutral', 'neutre'];

/**
 * Words of a channel name. A unit behind the name (`i1_A`) is left out, unless it is the phase: `I_A` beside `I_B` and
 * `I_C`.
 *
 * @param names of all channels
 */
export function readName(
  name: string,
  unit: string,
  quantity: PowerQuantity,
  names: readonly string[],
): ChannelName {
  const words = splitWords(name);
  const last = words.at(-1);
  if (words.length > 1 && last === unit.trim().toLowerCase() && !hasSiblings(words, names)) words.pop();
  const bare = withoutMark(words, MARKS[quantity]);
  const telling = bare.filter((word) => !FILLERS.includes(word));
  return { words: telling.length > 0 ? telling : bare };
}

/** All ways to read the name as a phase within the alphabets; digits beyond 3 are told by `otherNumbers`. */
export function phaseReadings({ words }: ChannelName, alphabets: readonly string[]): PhaseReading[] {
  return words.flatMap((word, at) =>
    alphabets.flatMap((alphabet) => {
      const match = phasePattern(alphabet).exec(word);
      if (match === null) return [];
      const { before = '', letter, after = '', neutral } = match.groups!;
      const next = words[at + 1];
      const stem = [...words.slice(0, at), `${before}#${after}`];
      const rest = words.slice(next === 'n' ? at + 2 : at + 1);
      return [
        {
          alphabet,
          phase: (alphabet.indexOf(letter!) + 1) as PhaseNumber,
          stem: [...stem, ...rest].join(' '),
          toNeutral: neutral === 'n' || next === 'n',
        },
      ];
    }),
  );
}

/** Stems under which the name carries a number other than 1, 2, 3: u4 shows that u1, u2, u3 are no phases. */
export function otherNumbers({ words }: ChannelName): string[] {
  return words.flatMap((word, at) =>
    /^\d+$/.test(word) && !/^[123]$/.test(word)
      ? [[...words.slice(0, at), '#', ...words.slice(at + 1)].join(' ')]
      : [],
  );
}

/** True for a name like U12, VAB, U L1-L2 or VLL: a voltage between lines. */
export function isLineToLine({ words }: ChannelName): boolean {
  return [...words, words.join('')].some((word) => {
    const bare = word.replaceAll('l', '');
    if (word === 'll') return true;
    if (bare.length !== 2 || bare[0] === bare[1]) return false;
    return [...LETTER_ALPHABETS, DIGITS].some((alphabet) => [...bare].every((c) => alphabet.includes(c)));
  });
}

export function isNeutral({ words }: ChannelName): boolean {
  return words.some((word) => NEUTRAL.includes(word));
}

function splitWords(name: string): string[] {
  return name
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== '');
}

function hasSiblings(words: string[], names: readonly string[]): boolean {
  const stem = words.slice(0, -1);
  const known = new Set(names.map((name) => splitWords(name).join(' ')));
  return LETTER_ALPHABETS.some(
    (alphabet) =>
      alphabet.includes(words.at(-1)!) &&
      [...alphabet].every((letter) => known.has([...stem, letter].join(' '))),
  );
}

/** Takes out the first word that is a mark, or else the mark in front of a word, of a phase if there is one. */
function withoutMark(words: string[], marks: string[]): string[] {
  const whole = words.findIndex((word) => marks.includes(word));
  if (whole >= 0) return words.filter((_, i) => i !== whole);
  const unmarked = words.map((word) => {
    const mark = marks.find((candidate) => word.startsWith(candidate));
    return mark === undefined ? null : word.slice(mark.length);
  });
  const isPhase = (rest: string | null) =>
    rest !== null && [...LETTER_ALPHABETS, DIGITS].some((alphabet) => phasePattern(alphabet).test(rest));
  const phase = unmarked.findIndex(isPhase);
  const at = phase >= 0 ? phase : unmarked.findIndex((rest) => rest !== null);
  return words.map((word, i) => (i === at ? unmarked[i]! : word));
}

/** `a`, `la`, `pha`, `an`, `1a`, `a1` for letters; `1`, `l1`, `ph1`, `1n` for digits. */
function phasePattern(alphabet: string): RegExp {
  const prefix = '(?:phase|ph|line|l)?';
  return alphabet === DIGITS
    ? /^(?:phase|ph|line|l)?(?<letter>[123])(?<neutral>n)?$/
    : new RegExp(`^${prefix}(?<before>\\d*)(?<letter>[${alphabet}])(?<neutral>n)?(?<after>\\d*)$`);
}
