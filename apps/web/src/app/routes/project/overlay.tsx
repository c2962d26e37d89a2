import { Button, Text } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { EmptyState } from '../../../components/empty-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { MarginLayout } from '../../../components/margin-column.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { PageHeader } from '../../../components/page-header.js';
import { limitSetsQuery } from '../../../features/limits/api/list-limit-sets.js';
import { OverlayFigure } from '../../../features/overlay/components/overlay-figure.js';
import { OverlayLegend } from '../../../features/overlay/components/overlay-legend.js';
import {
  addChannels,
  moveEntry,
  overlayCapacity,
  type OverlayEntry,
  type OverlayView,
} from '../../../features/overlay/overlay-link.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';
import { OverlayPicker } from './overlay-picker.js';
import { useOverlayData, useOverlayLink } from './use-overlay.js';

export function Component() {
  const project = useProject(useProjectId());
  const { entries, leftOut, view, setEntries, setView } = useOverlayLink();
  const data = useOverlayData(entries, view.by);
  const limitSets = useQuery(limitSetsQuery(project.id));
  const [picking, setPicking] = useState(false);
  const setId = view.limitSetId ?? project.comparisonLimitSetId;
  const set = limitSets.data?.find(({ id }) => id === setId) ?? null;
  const pick = () => setPicking(true);
  const remove = (index: number) => {
    const label = data.items[index]?.series?.label ?? 'The channel';
    setEntries(entries.filter((_, i) => i !== index));
    notifyDone(`${label} removed from the overlay`, () => setEntries(entries));
  };
  return (
    <>
      <PageHeader
        title="Overlay"
        subtitle={entries.length > 0 ? subtitle(entries, view) : undefined}
        documentTitle={`Overlay, ${project.name}`}
        actions={entries.length > 0 ? <Button onClick={copyLink}>Copy link</Button> : undefined}
      />
      {leftOut > 0 ? (
        <Text role="alert" color="near" mb="3">
          {`The link names ${overlayCapacity + leftOut} channels and an overlay holds ${overlayCapacity}: the last ${leftOut === 1 ? 'one is' : `${leftOut} are`} left out.`}
        </Text>
      ) : null}
      {entries.length === 0 ? (
        <EmptyState
          title="Nothing to compare yet"
          actions={
            <Button variant="solid" onClick={pick}>
              Add channels
            </Button>
          }
        >
          Put up to twelve channels over each other, by order or by frequency. Add them here, or select
          recordings in the list and choose Overlay.
        </EmptyState>
      ) : (
        <MarginLayout
          margin={
            <OverlayLegend
              items={data.items}
              limitSet={set}
              recordingTo={(id) => paths.recording(project.id, id)}
              onAdd={pick}
              onMove={(index, by) => setEntries(moveEntry(entries, index, by))}
              onRemove={remove}
            />
          }
        >
          {data.series.length > 0 ? (
            <OverlayFigure
              series={data.series}
              spectra={data.spectra}
              pending={data.pendingSpectra}
              view={view}
              limitSets={limitSets.data ?? []}
              onChange={setView}
            />
          ) : data.isPending ? (
            <LoadingState label="Loading the channels" lines={8} />
          ) : (
            <EmptyState title="No figures to draw" actions={<Button onClick={pick}>Add channels</Button>}>
              None of these channels has been analysed; the list beside says why. Add others.
            </EmptyState>
          )}
        </MarginLayout>
      )}
      {picking ? (
        <OverlayPicker
          projectId={project.id}
          present={data.items.map(({ entry, series }) => ({
            recordingId: entry.recordingId,
            channel: series?.summary.channel ?? entry.channel ?? 0,
          }))}
          onClose={() => setPicking(false)}
          onAdd={(channels) => {
            setEntries(addChannels(entries, channels));
            setPicking(false);
          }}
        />
      ) : null}
    </>
  );
}

function subtitle(entries: readonly OverlayEntry[], { by, orders }: OverlayView): string {
  const count = entries.length === 1 ? '1 channel' : `${entries.length} channels`;
  if (by === 'frequency') return `${count}, by frequency`;
  return `${count}, aligned by order, ${orders === 'odd' ? 'odd orders' : 'all orders'} shown`;
}

function copyLink(): void {
  navigator.clipboard.writeText(window.location.href).then(
    () => notifyDone('Link copied'),
    (error: unknown) => notifyProblem('Not copied', error),
  );
}
