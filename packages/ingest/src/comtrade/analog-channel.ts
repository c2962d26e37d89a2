import { type ConfigLine, numberField, refuseConfig } from './config-line.js';

/** An analog channel of a COMTRADE record. Value = a x stored number + b, in `unit`. */
export interface AnalogChannel {
  name: string;
  phase: string;
  circuit: string;
  unit: string;
  a: number;
  b: number;
  /** Delay against the first channel of the same record, in microseconds. */
  skewUs: number;
  /** Ends of the range of stored numbers, null where the file states none. */
  lowest: number | null;
  highest: number | null;
  /** Rated values of the transformer, null where the file states none (1991). */
  primary: number | null;
  secondary: number | null;
  /** Whether a and b lead to primary or secondary values. */
  side: 'primary' | 'secondary' | null;
}

function optionalNumber(written: string | undefined): number | null {
  const value = written === undefined || written === '' ? NaN : Number(written);
  return Number.isFinite(value) ? value : null;
}

/** Reads the line of an analog channel: An, ch_id, ph, ccbm, uu, a, b, skew, min, max, primary, secondary, PS. */
export function parseAnalogChannel(line: ConfigLine, index: number): AnalogChannel {
  const { fields } = line;
  if (fields.length < 7) {
    refuseConfig(
      line.number,
      `analog channel ${index + 1} has ${fields.length} fields; at least 10 are laid down`,
    );
  }
  const side = (fields[12] ?? '').toUpperCase();
  return {
    name: fields[1] || `channel ${index + 1}`,
    phase: fields[2] ?? '',
    circuit: fields[3] ?? '',
    // Kelvin is no factor of these: a capital K before them is the prefix kilo.
    unit: (fields[4] ?? '').replace(/^K(?=[VAW])/, 'k'),
    a: numberField(line, 5, `the factor a of analog channel ${index + 1}`),
    b: numberField(line, 6, `the offset b of analog channel ${index + 1}`),
    skewUs: optionalNumber(fields[7]) ?? 0,
    lowest: optionalNumber(fields[8]),
    highest: optionalNumber(fields[9]),
    primary: optionalNumber(fields[10]),
    secondary: optionalNumber(fields[11]),
    side: side === 'P' ? 'primary' : side === 'S' ? 'secondary' : null,
  };
}
