import { Button, Grid, Stack, Text } from '@chakra-ui/react';
import type { ImportOptions, ImportPreview, Recording } from '@overtally/contracts';
import { skipToken, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Modal } from '../../../components/modal.js';
import { sourceHeadQuery } from '../api/get-source-head.js';
import { ColumnFields } from './column-fields.js';
import { DialectFields } from './dialect-fields.js';
import { FileLines } from './file-lines.js';
import { draftOf, faultsOf, optionsOf } from './import-draft.js';
import { ReadRows } from './read-rows.js';
import { useImportPreview } from './use-import-preview.js';

/** A file about to be sent, or a recording whose kept source is to be read again. */
export type ImportSource = { kind: 'file'; file: File } | { kind: 'recording'; recording: Recording };

/** Problems that no setting of the form can mend. */
const unreadable = new Set([
  'empty-file',
  'not-a-capture',
  'not-riff',
  'no-format-chunk',
  'no-data-chunk',
  'bad-format-chunk',
  'header-cut',
  'unsupported-encoding',
  'unsupported-shape',
  'bad-header',
  'bad-configuration',
  'comtrade-half',
  'data-type-differs',
  'no-configuration',
  'no-data-section',
  'several-sampling-rates',
]);

interface ImportDialogProps {
  open: boolean;
  projectId: string;
  source: ImportSource;
  pending?: boolean;
  onClose: () => void;
  onRead: (options: ImportOptions) => void;
}

/** How a file is to be read: its lines beside what comes of them, and every setting that decides it. */
export function ImportDialog(props: ImportDialogProps) {
  const { source } = props;
  const { name, size } = source.kind === 'file' ? source.file : source.recording.file;
  return (
    <Modal open={props.open} onClose={props.onClose} title={`Read ${name}`} size="xl">
      <ImportForm key={`${name} ${size}`} {...props} />
    </Modal>
  );
}

function ImportForm({ projectId, source, pending = false, onClose, onRead }: ImportDialogProps) {
  const [draft, setDraft] = useState(() =>
    draftOf(source.kind === 'recording' ? source.recording.import : {}),
  );
  const head = useQuery(
    source.kind === 'recording'
      ? sourceHeadQuery(source.recording)
      : { queryKey: ['source-head', 'local'] as const, queryFn: skipToken },
  );
  const preview = useImportPreview(projectId, previewSource(source, head.data), draft);
  const faults = faultsOf(draft);
  const shown = preview.data ?? null;
  const change = (part: Partial<typeof draft>) => setDraft((before) => ({ ...before, ...part }));
  const needsSampleRate = shown?.problem?.code === 'needs-sample-rate';
  const hopeless = unreadable.has(shown?.problem?.code ?? '');
  const blocked = hopeless || Object.keys(faults).length > 0 || (needsSampleRate && !draft.sampleRateHz);
  return (
    <Stack gap="5">
      {head.isError ? <ErrorState error={head.error} onRetry={() => void head.refetch()} /> : null}
      {preview.isError ? <ErrorState error={preview.error} onRetry={() => void preview.refetch()} /> : null}
      {shown ? <Doubts preview={shown} /> : null}
      {!shown && !preview.isError && !head.isError ? <LoadingState label="Looking into the file" /> : null}
      {shown && shown.format !== 'wav' ? (
        <Grid templateColumns={{ base: 'minmax(0, 1fr)', md: 'minmax(0, 1fr) minmax(0, 1fr)' }} gap="4">
          {shown.lines.length > 0 ? <FileLines lines={shown.lines} /> : null}
          <ReadRows preview={shown} />
        </Grid>
      ) : null}
      <DialectFields
        draft={draft}
        faults={faults}
        preview={shown}
        needsSampleRate={needsSampleRate}
        onChange={change}
      />
      {shown ? (
        <ColumnFields
          draft={draft}
          fault={faults.columns}
          preview={shown}
          onChange={(columns) => change({ columns })}
        />
      ) : null}
      <Stack direction="row" justify="flex-end" gap="2" pb="2">
        <Button onClick={onClose}>{source.kind === 'file' ? 'Leave this file out' : 'Cancel'}</Button>
        <Button
          variant="solid"
          disabled={blocked}
          loading={pending}
          onClick={() => onRead(optionsOf(draft, shown))}
        >
          Read with these settings
        </Button>
      </Stack>
    </Stack>
  );
}

function previewSource(source: ImportSource, head: File | undefined) {
  if (source.kind === 'file') return { file: source.file, sizeBytes: source.file.size };
  return head ? { file: head, sizeBytes: source.recording.file.size } : undefined;
}

/** What the reader is unsure of or refuses, with the place and the cure. */
function Doubts({ preview }: { preview: ImportPreview }) {
  const { problem } = preview;
  const place = [
    problem?.line === undefined ? null : `line ${problem.line}`,
    problem?.column === undefined ? null : `column ${problem.column}`,
  ].filter(Boolean);
  const doubts = preview.doubts.filter((doubt) => doubt !== problem?.message);
  if (!problem && doubts.length === 0) return null;
  return (
    <Stack gap="1" borderLeftWidth="3px" borderColor={problem ? 'over' : 'near'} pl="3" role="status">
      {problem ? (
        <Text>
          <strong>{problem.message}</strong>
          {place.length > 0 ? ` (${place.join(', ')})` : ''} {problem.cure}
        </Text>
      ) : null}
      {doubts.map((doubt) => (
        <Text key={doubt}>{doubt}</Text>
      ))}
    </Stack>
  );
}
