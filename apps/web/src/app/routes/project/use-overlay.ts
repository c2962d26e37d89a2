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

/** The recordings of the entries, and their spectra where the view needs them. */
export function useOverlayData(entries: readonly OverlayEntry[], by: OverlayView['by']) {
  const ids = [...new Set(entries.map(({ recordingId }) => recordingId))];
  const recordings = useQueries({ queries: ids.map(recordingQuery) });
  const resolved = entries.map((entry) => {
    const query = recordings[ids.indexOf(entry.recordingId)];
    const recording = query?.data ?? null;
    return { entry, query, recording, own: recording && seriesOf(entry, recording) };
  });
  const found = resolved.map(({ own, ...rest }, index) => {
    const isRepeated = resolved
      .slice(0, index)
      .some((earlier) => earlier.own && earlier.own.key === own?.key);
    return { ...rest, isRepeated, series: isRepeated ? null : own };
  });
  const series = found.flatMap((one) => (one.series ? [one.series] : []));
  const spectra = useQueries({
    queries: series.map(({ analysisId, summary }) => ({
      ...spectrumQuery(analysisId, summary.channel),
      enabled: by === 'frequency',
    })),
  });
  const spectrumAt = (key: string | undefined) => spectra[series.findIndex((one) => one.key === key)];
  const items = found.map(({ entry, query, recording, isRepeated, series: one }): LegendItem => {
    const spectrum = by === 'frequency' ? spectrumAt(one?.key) : undefined;
    const failed = query?.isError ? query : spectrum?.isError ? spectrum : undefined;
    return {
      entry,
      recording,
      series: one,
      problem: failed
        ? problemText(failed.error)
        : recording && !one
          ? withoutFigures(recording.status)
          : null,
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
    pendingRecordings: recordings.filter((query) => query.isPending).length,
    pendingSpectra: by === 'frequency' ? spectra.filter((query) => query.isPending).length : 0,
  };
}

function withoutFigures(status: string): string {
  if (status === 'ready') return 'It has no such channel.';
  return status === 'failed' ? 'It could not be read: see its sheet.' : 'It is being analysed.';
}
