import { Table } from '@chakra-ui/react';
import type { LimitSet, Recording } from '@overtally/contracts';
import { Sheet } from '../../../components/sheet.js';
import { RecordingRow } from './recording-row.js';

interface RecordingTableProps {
  recordings: readonly Recording[];
  limitSet: LimitSet | null;
  recordingTo: (recordingId: string) => string;
  selection: ReadonlySet<string>;
  onSelect: (recordingId: string, selected: boolean) => void;
  /** Whether reading may be called off. */
  mayCancel: boolean;
}

/** As many recordings as one overlay holds. */
export const overlayCapacity = 12;

/** Recordings with their figures and tally strips. On narrow screens the strip stands under the name. */
export function RecordingTable({
  recordings,
  limitSet,
  recordingTo,
  selection,
  onSelect,
  mayCancel,
}: RecordingTableProps) {
  return (
    <Sheet overflowX="auto">
      <Table.Root size="sm">
        <Table.Caption srOnly>Recordings</Table.Caption>
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col" aria-label="Chosen" />
            <Table.ColumnHeader scope="col" hideBelow="sm">
              No.
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Recording</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="xl">
              Captured
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end" hideBelow="2xl">
              Rate
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end" hideBelow="xl">
              Length
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end" hideBelow="md">
              f<sub>1</sub>
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end" hideBelow="md">
              rms
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end" hideBelow="md">
              THD<sub>F</sub>
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="lg">
              Orders 2 to 40 against the limit
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {recordings.map((recording) => (
            <RecordingRow
              key={recording.id}
              recording={recording}
              limitSet={limitSet}
              to={recordingTo(recording.id)}
              selected={selection.has(recording.id)}
              selectable={selection.size < overlayCapacity}
              onSelect={(selected) => onSelect(recording.id, selected)}
              mayCancel={mayCancel}
            />
          ))}
        </Table.Body>
      </Table.Root>
    </Sheet>
  );
}
