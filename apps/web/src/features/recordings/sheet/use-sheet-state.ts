import type { ChannelAnalysis, Note, Recording } from '@overtally/contracts';
import { useState } from 'react';
import { clampSpan, firstView, resized, type Span } from '../charts/span.js';
import type { NoteTarget } from './note-target.js';
import { fitted, followOrder, type SeriesChoice } from './series/series-choice.js';

/** Places of the sheet that can be led to. */
export const figureIds = {
  time: 'figure-time',
  spectrum: 'figure-spectrum',
  series: 'figure-series',
} as const;

/** Brings a figure into view where it is not. */
const reveal = (figure: keyof typeof figureIds) =>
  document.getElementById(figureIds[figure])?.scrollIntoView({ block: 'nearest' });

/** Where a note stands in the margin: beside the waveform, or beside the spectrum. */
export type NotePlace = 'time' | 'spectrum';
export const placeOfTarget = ({ kind }: NoteTarget): NotePlace => (kind === 'span' ? 'time' : 'spectrum');

/** Cycles shown around a moment that is pointed at. */
const cyclesAround = 4;

/** What is in view and selected on the sheet of a channel, and how one figure leads to another. */
export function useSheetState(
  channel: ChannelAnalysis,
  recording: Recording,
  onChannel: (index: number) => void,
) {
  const durationS = recording.durationS ?? 0;
  const fundamentalHz = channel.fundamental?.frequencyHz ?? null;
  const [chosenView, setChosenView] = useState<Span | null>(null);
  const [markS, setMarkS] = useState<number | null>(null);
  const [target, setTarget] = useState<NoteTarget | null>(null);
  const [writingAt, setWritingAt] = useState<NotePlace | null>(null);
  const [followed, setFollowed] = useState<SeriesChoice>({ figure: 'rms', order: 1, aggregation: 'window' });
  const view = chosenView ?? firstView(durationS, fundamentalHz);

  const select = (wanted: NoteTarget | null) => {
    setTarget(wanted);
    if (wanted?.kind === 'order') setFollowed((before) => followOrder(channel, wanted.order, before));
  };
  const setView = (wanted: Span) => {
    setChosenView(wanted);
    setMarkS(null);
  };
  return {
    view,
    setView,
    markS,
    target,
    select,
    series: fitted(followed, channel),
    setSeries: setFollowed,
    writingAt,
    /** Opens the form of a note where it was asked for; it stays there while another target is selected. */
    write: (place: NotePlace | null) => setWritingAt(place),
    noteOnView: () => {
      setTarget({ kind: 'span', ...view });
      setWritingAt((before) => before ?? 'time');
    },
    /** Shows a moment of the record in the waveform. */
    showTime: (timeS: number) => {
      const lengthS = fundamentalHz ? cyclesAround / fundamentalHz : view.toS - view.fromS;
      setChosenView(clampSpan({ fromS: timeS - lengthS / 2, toS: timeS + lengthS / 2 }, durationS, 0));
      setMarkS(timeS);
      reveal('time');
    },
    /** Shows what a note speaks of. */
    showNote: (note: Note) => {
      if (note.channel !== channel.index) onChannel(note.channel);
      if (note.target.kind === 'span') setView(clampSpan(resized(note.target, 1.5), durationS, 0));
      setTarget(note.target);
      reveal(placeOfTarget(note.target));
    },
    followTarget: () => reveal('series'),
    followInterharmonic: (lowerOrder: number) => {
      setFollowed((before) => ({ ...before, figure: 'interharmonicGroup', order: lowerOrder }));
      reveal('series');
    },
    showLine: (wanted: NoteTarget) => {
      select(wanted);
      reveal('spectrum');
    },
    changeChannel: (index: number) => {
      onChannel(index);
      setTarget(null);
    },
  };
}
