import type { Delimiter } from '../types.js';
import { splitCells } from './lines.js';

const RATE = /(sampl\w*|abtast\w*|scan)[\s_-]*(rate|freq\w*)|abtast(rate|frequenz)|^fs$/i;
const INTERVAL =
  /(sampl\w*|abtast\w*)[\s_-]*(interval|period|time|step)|abtast(intervall|zeit)|^(delta[\s_-]*t|dt|x[\s_-]*inc\w*|increment)$/i;
const RATE_FACTOR: Record<string, number> = { '': 1, k: 1e3, M: 1e6, G: 1e9 };
const TIME_FACTOR: Record<string, number> = { '': 1, m: 1e-3, u: 1e-6, µ: 1e-6, μ: 1e-6, n: 1e-9 };

/** Key and value pairs of the lines before the table; lines of another form are left out. */
export function readMetadata(lines: string[], delimiter: Delimiter): Record<string, string> {
  const entries: [string, string][] = [];
  for (const line of lines) {
    const text = line.replace(/^\s*(#|%|\/\/)+\s*/, '');
    const cells = splitCells(text, delimiter).filter((cell) => cell !== '');
    const pair = /^([^:=]{1,60}?)\s*[:=]\s*(.*)$/.exec(text.trim());
    if (pair !== null && (cells.length < 2 || delimiter === ' ' || /[:=]$/.test(cells[0] ?? ''))) {
      const value =
        delimiter === ' '
          ? (pair[2] ?? '')
          : splitCells(pair[2] ?? '', delimiter)
              .filter(Boolean)
              .join(' ');
      entries.push([pair[1] ?? '', value]);
    } else if (cells.length >= 2)
      entries.push([(cells[0] ?? '').replace(/[:=]$/, '').trim(), cells.slice(1).join(' ')]);
  }
  return Object.fromEntries(entries.filter(([key]) => key !== '' && key !== '__proto__'));
}

function numberAndUnit(key: string, value: string): { number: number; unit: string } | null {
  const match = /^([+-]?\d*[.,]?\d+(?:[eE][+-]?\d+)?)\s*(.*)$/.exec(value.trim());
  if (match === null) return null;
  const unitInKey = /[[(]\s*([^\])]+?)\s*[\])]/.exec(key)?.[1] ?? '';
  return { number: Number((match[1] ?? '').replace(',', '.')), unit: (match[2] ?? '').trim() || unitInKey };
}

/** Sample rate that the lines before the table state, as a rate or as an interval; null when they state none. */
export function statedSampleRateHz(metadata: Record<string, string>): number | null {
  for (const [key, value] of Object.entries(metadata)) {
    const name = key.replace(/[[(].*$/, '').trim();
    const stated = numberAndUnit(key, value);
    if (stated === null || !(stated.number > 0)) continue;
    const rateUnit = /^([kMG]?)(Hz|S\/s|Sa\/s|Samples\/s|sps)?$/i.exec(stated.unit);
    if (RATE.test(name) && rateUnit !== null) return stated.number * (RATE_FACTOR[rateUnit[1] ?? ''] ?? 1);
    const timeUnit = /^([muµμn]?)(s|sec|seconds?)?$/.exec(stated.unit);
    if (INTERVAL.test(name) && timeUnit !== null)
      return 1 / (stated.number * (TIME_FACTOR[timeUnit[1] ?? ''] ?? 1));
  }
  return null;
}
