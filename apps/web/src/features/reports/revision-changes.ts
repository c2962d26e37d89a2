import type { Report, ReportSection } from '@overtally/contracts';
import { verdictWords } from '../../components/verdict/verdict-words.js';
import { limitSetName } from '../../lib/limit-set-name.js';

/** One difference between two revisions, in words. */
export interface RevisionChange {
  subject: string;
  before: string;
  after: string;
}

type Compared = Pick<Report, 'title' | 'summary' | 'deviations' | 'content'>;

const none = 'none';

/** What a revision says otherwise than the one before: its words, its verdicts and their results. */
export function revisionChanges(before: Compared, after: Compared): RevisionChange[] {
  const words = (['title', 'summary', 'deviations'] as const).flatMap((field) =>
    difference(wordsOf[field], before[field] || none, after[field] || none),
  );
  const result = difference(
    'Result',
    verdictWords[before.content.result],
    verdictWords[after.content.result],
  );
  return [...words, ...result, ...sectionChanges(before.content.sections, after.content.sections)];
}

const wordsOf = { title: 'Title', summary: 'Summary', deviations: 'Deviations' } as const;

function difference(subject: string, before: string, after: string): RevisionChange[] {
  return before === after ? [] : [{ subject, before, after }];
}

/** Sections of the same recording, channel and limit set are one and the same judged anew. */
function sectionChanges(before: ReportSection[], after: ReportSection[]): RevisionChange[] {
  const rest = [...before];
  const changes = after.flatMap((section) => {
    const index = rest.findIndex((other) => other.verdict.id === section.verdict.id);
    const place = index >= 0 ? index : rest.findIndex((other) => subjectOf(other) === subjectOf(section));
    const [earlier] = place >= 0 ? rest.splice(place, 1) : [];
    if (!earlier) return [{ subject: subjectOf(section), before: none, after: verdictOf(section) }];
    if (earlier.verdict.id === section.verdict.id) return notesChange(earlier, section);
    return [{ subject: subjectOf(section), before: verdictOf(earlier), after: verdictOf(section) }];
  });
  const dropped = rest.map((section) => ({
    subject: subjectOf(section),
    before: verdictOf(section),
    after: none,
  }));
  return [...changes, ...dropped];
}

const notesChange = (before: ReportSection, after: ReportSection) =>
  difference(`Notes on ${subjectOf(after)}`, notesOf(before), notesOf(after));

const notesOf = ({ notes }: ReportSection): string => notes.map(({ text }) => text).join('; ') || none;

const subjectOf = ({ recording, verdict }: ReportSection): string =>
  `${recording.number}, ${verdict.channelName}, ${limitSetName(verdict.limitSet)}`;

const verdictOf = ({ verdict }: ReportSection): string =>
  [verdictWords[verdict.result], verdict.reason].filter(Boolean).join(': ');
