import type { NoteTarget } from '../note-target.js';

/** What a note speaks of, as the form holds it. */
export interface TargetValues {
  kind: NoteTarget['kind'];
  order: string;
  frequencyHz: string;
  fromS: string;
  toS: string;
}

const digits = (value: number) => String(Number(value.toPrecision(9)));
const numberOf = (text: string) => (text.trim() === '' ? Number.NaN : Number(text.trim().replace(',', '.')));

/** Fields for `target`; the part in view fills the span until one is chosen. */
export function toTargetValues(
  target: NoteTarget | null,
  view: { fromS: number; toS: number },
): TargetValues {
  const span = target?.kind === 'span' ? target : view;
  return {
    kind: target?.kind ?? 'order',
    order: target?.kind === 'order' ? String(target.order) : '',
    frequencyHz: target?.kind === 'line' ? digits(target.frequencyHz) : '',
    fromS: digits(span.fromS),
    toS: digits(span.toS),
  };
}

/** The target that the fields name, or what is wrong with them. A decimal comma is taken too. */
export function toTarget(values: TargetValues): NoteTarget | { problem: string } {
  switch (values.kind) {
    case 'order': {
      const order = numberOf(values.order);
      if (!Number.isInteger(order) || order < 1) return { problem: 'Choose an order' };
      return { kind: 'order', order };
    }
    case 'line': {
      const frequencyHz = numberOf(values.frequencyHz);
      if (!(frequencyHz >= 0)) return { problem: 'Give the frequency in Hz, such as 175.5' };
      return { kind: 'line', frequencyHz };
    }
    case 'span': {
      const fromS = numberOf(values.fromS);
      const toS = numberOf(values.toS);
      if (!(fromS >= 0) || !Number.isFinite(toS)) return { problem: 'Give both ends in seconds' };
      if (toS <= fromS) return { problem: 'The span must end after it begins' };
      return { kind: 'span', fromS, toS };
    }
  }
}
