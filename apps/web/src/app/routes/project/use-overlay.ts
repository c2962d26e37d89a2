import type { RecordingStatus } from '@overtally/contracts';
import { useQueries } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { SpectrumOf } from '../../../features/overlay/charts/spectrum-lines.js';
import type { LegendItem } from '../../../features/overlay/components/overlay-legend.js';
import {
  readEntries,
  readView,
  writeEntries,
  type OverlayEntry,
  type OverlayView,
} from '../../../features/overlay/overlay-link.js';
import { seriesOf } from '../../../features/overlay/series.js';
import { recordingQuery } from '../../../features/recordings/api/get-recording.js';
import { spectrumQuery } from '../../../features/recordings/api/get-spectrum.js';
import { problemText } from '../../../lib/api-problem.js';

const names: Record<keyof OverlayView, string> = {
  by: 'by',
  scale: 'scale',
  amplitude: 'as',
  orders: 'orders',
  limitSetId: 'limits',
};

/** What the overlay holds and how it is drawn, kept in the address so that the link is the overlay. */
export function useOverlayLink() {
  const [search, setSearch] = useSearchParams();
  const { entries, leftOut } = useMemo(() => readEntries(search.get('r')), [search]);
  const view = useMemo(() => readView(search), [search]);
  const change = (edit: (next: URLSearchParams) => void) =>
    setSearch(
      (before) => {
        const next = new URLSearchParams(before);
        edit(next);
        return next;
      },
      { replace: true },
    );
  const setEntries = (next: readonly OverlayEntry[]) =>
    change((params) => (next.length > 0 ? params.set('r', writeEntries(next)) : params.delete('r')));
  const setView = (changes: Partial<OverlayView>) =>
    change((params) => {
      for (const [key, value] of Object.entries(changes) as [keyof OverlayView, string | null][]) {
        if (value) params.set(names[key], value);
        else params.delete(names[key]);
      }
    });
  return { entries, leftOut, view, setEntries, setView };
}

/** Entries with their recordings; a channel that stands there already is not drawn again. */
function useResolved(entries: readonly OverlayEntry[]) {
  const ids = [...new Set(entries.map(({ recordingId }) => recordingId))];
  const recordings = useQueries({ queries: ids.map(recordingQuery) });
  const keys = new Set<string>();
  return entries.map((entry) => {
    const query = recordings[ids.indexOf(entry.recordingId)];
    const recording = query?.data ?? null;
    const series = recording && seriesOf(entry, recording);
    const isRepeated = series !== null && keys.has(series.key);
    if (series) keys.add(series.key);
    return { entry, query, recording, isRepeated, series: isRepeated ? null : series };
  });
}

/** The recordings of the entries, and their spectra where the view needs them. */
export function useOverlayData(entries: readonly OverlayEntry[], by: OverlayView['by']) {
  const resolved = useResolved(entries);
  const series = resolved.flatMap((one) => (one.series ? [one.series] : []));
  const spectra = useQueries({
    queries: series.map(({ analysisId, summary }) => ({
      ...spectrumQuery(analysisId, summary.channel),
      enabled: by === 'frequency',
    })),
  });
  const items = resolved.map(({ entry, query, recording, isRepeated, series: own }): LegendItem => {
    const spectrum = own && by === 'frequency' ? spectra[series.indexOf(own)] : undefined;
    const failed = [query, spectrum].find((each) => each?.isError);
    const missing = recording && !own ? withoutFigures(recording.status, isRepeated) : null;
    return {
      ...{ entry, recording, series: own },
      problem: failed ? problemText(failed.error) : missing,
      ...(failed ? { onRetry: () => void failed.refetch() } : {}),
    };
  });
  return {
    items,
    series,
    spectra: series.flatMap((one, index): SpectrumOf[] => {
      const spectrum = spectra[index]?.data;
      return spectrum ? [{ series: one, spectrum }] : [];
    }),
    isPending: resolved.some(({ query }) => query?.isPending),
    pendingSpectra: by === 'frequency' ? spectra.filter((query) => query.isPending).length : 0,
  };
}

function withoutFigures(status: RecordingStatus, isRepeated: boolean): string {
  if (isRepeated) return 'This channel is in the overlay already.';
  if (status === 'ready') return 'It has no such channel.';
  return status === 'failed' ? 'It could not be read: see its sheet.' : 'It is being analysed.';
}
