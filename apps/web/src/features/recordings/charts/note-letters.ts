import type { Note } from '@overtally/contracts';

/** a … z, then aa, ab … */
export function letterOf(index: number): string {
  const last = String.fromCharCode(97 + (index % 26));
  return index < 26 ? last : letterOf(Math.floor(index / 26) - 1) + last;
}

export interface LetteredNote {
  letter: string;
  note: Note;
}

/** Letters in the order of writing, so that they stay when more notes follow. */
export function withLetters(notes: readonly Note[]): LetteredNote[] {
  return notes.map((note, index) => ({ letter: letterOf(index), note }));
}
