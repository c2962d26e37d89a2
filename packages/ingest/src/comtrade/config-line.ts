import { refuse } from '../refusal.js';

/** One line of the configuration: its fields without blanks around them, and its number in the file. */
export interface ConfigLine {
  fields: string[];
  number: number;
}

/** Refuses the configuration at a line. */
export function refuseConfig(line: number, what: string): never {
  return refuse(
    'bad-configuration',
    `Line ${line} of the COMTRADE file: ${what}.`,
    'Export the record again, or correct the line as IEEE C37.111 (IEC 60255-24) lays it out.',
    { line },
  );
}

/** A field that must be a finite number. */
export function numberField(line: ConfigLine, index: number, what: string): number {
  const written = line.fields[index] ?? '';
  const value = written === '' ? NaN : Number(written);
  return Number.isFinite(value)
    ? value
    : refuseConfig(line.number, `${what} is "${written}", which is no number`);
}
