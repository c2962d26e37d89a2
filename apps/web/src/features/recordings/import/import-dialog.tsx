import { Button, Grid, Stack } from '@chakra-ui/react';
import type { ImportOptions, Recording } from '@overtally/contracts';
import { skipToken, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { Modal } from '../../../components/modal.js';
import { sourceHeadQuery } from '../api/get-source-head.js';
import { ColumnFields } from './column-fields.js';
import { DialectFields } from './dialect-fields.js';
import { Doubts } from './doubts.js';
import { FileLines } from './file-lines.js';
import { draftOf, faultsOf, hasFaults, keptColumns } from './import-draft.js';
import { IrregularFields } from './irregular-fields.js';
import { KeepRule } from './keep-rule.js';
import { ReadRows } from './read-rows.js';
import { RuleLine } from './rule-line.js';
import { SignalFigure } from './signal-figure.js';
import { useReading } from './use-reading.js';

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
  /** The settings to read by, and the rule they are those of; null where they are of no rule. */
  onRead: (options: ImportOptions, readingRuleId: string | null) => void;
}

/** How a file is to be read: its lines beside what comes of them, and every setting that decides it. */
export function ImportDialog(props: ImportDialogProps) {
  const { source } = props;
  const { name, size } = source.kind === 'file' ? source.file : source.recording.file;
  return (
    <Modal open={props.open} onClose={props.onClose} title={`Read ${name}`} size="wide">
      <ImportForm key={`${name} ${size}`} {...props} />
    </Modal>
  );
}

function ImportForm({ projectId, source, pending = false, onClose, onRead }: ImportDialogProps) {
  const head = useQuery(
    source.kind === 'recording'
      ? sourceHeadQuery(source.recording)
      : { queryKey: ['source-head', 'local'] as const, queryFn: skipToken },
  );
  const reading = useReading(
    projectId,
    previewSource(source, head.data),
    source.kind === 'recording'
      ? { draft: draftOf(source.recording.import), rule: source.recording.readingRule }
      : null,
  );
  const [shownLine, setShownLine] = useState<{ line: number; at: number } | null>(null);
  const [shownColumn, setShownColumn] = useState<number | null>(null);
  const { draft, layout, read, change } = reading;
  const faults = faultsOf(draft);
  const file = layout.data ?? null;
  const asRead = read.data ?? file;
  const error = layout.error ?? read.error;
  const needsSampleRate = asRead?.problem?.code === 'needs-sample-rate';
  const isSound = !hasFaults(faults) && (file === null || isSomethingKept(reading));
  const blocked =
    unreadable.has(asRead?.problem?.code ?? '') || !isSound || (needsSampleRate && !draft.sampleRateHz);
  const fileName = source.kind === 'file' ? source.file.name : source.recording.file.name;
  return (
    <Stack gap="5">
      <RuleLine projectId={projectId} reading={reading} mayKeep={isSound} />
      {head.isError ? <ErrorState error={head.error} onRetry={() => void head.refetch()} /> : null}
      {error ? <ErrorState error={error} onRetry={() => void layout.refetch()} /> : null}
      {asRead ? (
        <Doubts
          preview={asRead}
          lineCount={asRead.lines.length}
          onLine={(line) => setShownLine({ line, at: Date.now() })}
        />
      ) : null}
      {!file && !error && !head.isError ? <LoadingState label="Looking into the file" /> : null}
      {file && file.format !== 'wav' ? (
        <Grid templateColumns={{ base: 'minmax(0, 1fr)', md: 'minmax(0, 1fr) minmax(0, 1fr)' }} gap="4">
          {file.lines.length > 0 ? (
            <FileLines lines={file.lines} marked={asRead?.problem?.line ?? null} shown={shownLine} />
          ) : null}
          <ReadRows preview={file} />
        </Grid>
      ) : null}
      {file || error ? (
        <DialectFields
          draft={draft}
          faults={faults}
          preview={file}
          needsSampleRate={needsSampleRate}
          onChange={change}
        />
      ) : null}
      {file ? (
        <>
          <ColumnFields
            draft={draft}
            faults={faults}
            preview={file}
            signals={asRead?.signals ?? []}
            onChange={(columns, index) => {
              change({ columns });
              setShownColumn(index);
            }}
          />
          <SignalFigure
            signals={asRead?.signals ?? []}
            chosen={shownColumn}
            onChoose={setShownColumn}
            isBusy={read.isFetching}
          />
          <IrregularFields draft={draft} preview={file} onChange={change} />
        </>
      ) : null}
      {file && Object.keys(reading.options).length > 0 && (reading.isChanged || !reading.storedRule) ? (
        <KeepRule
          projectId={projectId}
          fileName={fileName}
          columnNames={file.columns.map(({ name }) => name)}
          options={reading.options}
          mayKeep={isSound}
          onKept={reading.belongTo}
        />
      ) : null}
      <Stack direction="row" justify="flex-end" gap="2" pb="2">
        <Button onClick={onClose}>{source.kind === 'file' ? 'Leave this file out' : 'Cancel'}</Button>
        <Button
          variant="solid"
          disabled={blocked}
          loading={pending}
          onClick={() => onRead(reading.options, reading.isChanged ? null : (reading.storedRule?.id ?? null))}
        >
          Read with these settings
        </Button>
      </Stack>
    </Stack>
  );
}

function isSomethingKept({ draft, layout }: ReturnType<typeof useReading>): boolean {
  const file = layout.data;
  return !file || file.columns.length === 0 || keptColumns(draft, file).length > 0;
}

function previewSource(source: ImportSource, head: File | undefined) {
  if (source.kind === 'file') return { file: source.file, sizeBytes: source.file.size };
  return head ? { file: head, sizeBytes: source.recording.file.size } : undefined;
}
