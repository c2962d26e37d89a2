import type { ReportContent, ReportSection } from '@overtally/contracts';
import { formatDate, formatDay, formatGiven, formatList } from './format.js';
import { notStated } from './words.js';

/** An item under test as the report identifies it; what is not known is empty. */
export interface ItemUnderTest {
  name: string;
  manufacturer: string;
  model: string;
  serialNumber: string;
  ratings: string;
  receivedOn: string | null;
  remark: string;
}

/** The items of all sections, each once, in the order they are met. */
export function itemsUnderTest(sections: readonly ReportSection[]): ItemUnderTest[] {
  const items = new Map<string, ItemUnderTest>();
  for (const { equipment, recording } of sections) {
    if (equipment !== null) {
      items.set(equipment.id, { ...equipment, ratings: ratingsWords(equipment.ratings) });
    } else if (recording.eut.trim() !== '') {
      const unknown = {
        manufacturer: '',
        model: '',
        serialNumber: '',
        ratings: '',
        receivedOn: null,
        remark: '',
      };
      items.set(`in words: ${recording.eut}`, { name: recording.eut, ...unknown });
    }
  }
  return [...items.values()];
}

type Ratings = NonNullable<ReportSection['equipment']>['ratings'];

/** "230 V, 50 Hz, 1.2 A, 240 W, 1 phase, class A"; empty where the plate says nothing. */
export function ratingsWords(ratings: Ratings): string {
  const { voltageV, frequencyHz, currentA, powerW, phases, emissionClass } = ratings;
  const figure = (value: number | undefined, unit: string): string | false =>
    value !== undefined && `${formatGiven(value)}\u00a0${unit}`;
  return [
    figure(voltageV, 'V'),
    figure(frequencyHz, 'Hz'),
    figure(currentA, 'A'),
    figure(powerW, 'W'),
    phases !== undefined && `${phases} phase${phases === 1 ? '' : 's'}`,
    emissionClass !== undefined && `class ${emissionClass} of IEC 61000-3-2`,
  ]
    .filter((part) => typeof part === 'string')
    .join(', ');
}

/** When the items came to the laboratory (ISO/IEC 17025:2017, 7.8.2.1 h). */
export function receivedDates(sections: readonly ReportSection[]): string {
  const days = itemsUnderTest(sections).flatMap(({ receivedOn }) =>
    receivedOn === null ? [] : [receivedOn],
  );
  if (days.length === 0) return notStated;
  return formatList([...new Set(days)].sort().map(formatDay));
}

/** First and last day of the captures (7.8.2.1 i). */
export function testDates(sections: readonly ReportSection[]): string {
  const moments = sections.flatMap(({ recording }) => recording.capturedAt ?? []).sort();
  if (moments.length === 0) return notStated;
  const [first, last] = [formatDate(moments[0]!), formatDate(moments[moments.length - 1]!)];
  return first === last ? first : `${first} to ${last}`;
}

/** Where the laboratory did its work: as the recordings state it, else its own address (7.8.2.1 c). */
export function placesOf({ sections, laboratory }: ReportContent): string {
  const places = new Set(sections.flatMap(({ conditions }) => conditions.place?.trim() || []));
  if (places.size > 0) return [...places].join('\n');
  return laboratory.address.trim() === '' ? notStated : `At the laboratory: ${laboratory.address}`;
}
