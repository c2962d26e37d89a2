import { Button, Link, Table, Text } from '@chakra-ui/react';
import type { Calibration } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Sheet } from '../../../components/sheet.js';
import { formatDay } from '../../../lib/calibration-words.js';
import { formatBytes, none } from '../../../lib/format.js';
import { apiUrl } from '../../../lib/http.js';
import { useLaboratoryChanges } from '../hooks/use-laboratory-changes.js';

interface CalibrationTableProps {
  calibrations: readonly Calibration[];
  /** The one that counts today; null where none does. */
  countingId: string | null;
}

/** Calibrations of an instrument, the newest first, each with its certificate. */
export function CalibrationTable({ calibrations, countingId }: CalibrationTableProps) {
  const [doomed, setDoomed] = useState<Calibration | null>(null);
  const { removeCalibration } = useLaboratoryChanges();
  return (
    <Sheet overflowX="auto">
      <Table.Root size="md" aria-label="Calibrations">
        <Table.Header>
          <Table.Row>
            <Table.ColumnHeader scope="col">Calibrated</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Due
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col" hideBelow="md">
              Uncertainty
            </Table.ColumnHeader>
            <Table.ColumnHeader scope="col">Certificate</Table.ColumnHeader>
            <Table.ColumnHeader scope="col" textAlign="end">
              Change
            </Table.ColumnHeader>
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {calibrations.map((calibration) => (
            <Table.Row key={calibration.id}>
              <Table.Cell whiteSpace="nowrap">
                {formatDay(calibration.calibratedOn)}
                <Text hideFrom="md" fontSize="13px">
                  due {formatDay(calibration.dueOn)}
                </Text>
                <Text color="inkSoft" fontSize="13px">
                  {calibration.id === countingId ? 'counts today' : calibration.calibratedBy}
                </Text>
              </Table.Cell>
              <Table.Cell hideBelow="md" whiteSpace="nowrap">
                {formatDay(calibration.dueOn)}
              </Table.Cell>
              <Table.Cell hideBelow="md">{calibration.uncertainty || none}</Table.Cell>
              <Table.Cell overflowWrap="anywhere">
                {calibration.certificateNumber || (calibration.certificate ? '' : none)}
                {calibration.certificate ? (
                  <Text fontSize="13px">
                    <Link href={apiUrl(`/calibrations/${calibration.id}/certificate`)} download>
                      {calibration.certificate.name} ({formatBytes(calibration.certificate.size)})
                    </Link>
                  </Text>
                ) : null}
              </Table.Cell>
              <Table.Cell textAlign="end">
                <Button
                  size="xs"
                  aria-label={`Delete the calibration of ${formatDay(calibration.calibratedOn)}`}
                  onClick={() => setDoomed(calibration)}
                >
                  Delete
                </Button>
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
      <ConfirmDialog
        open={doomed !== null}
        onClose={() => setDoomed(null)}
        title={`Delete the calibration of ${doomed ? formatDay(doomed.calibratedOn) : ''}?`}
        confirmLabel="Delete"
        destructive
        pending={removeCalibration.isPending}
        onConfirm={() =>
          removeCalibration.mutate(doomed!.id, {
            onSuccess: () => notifyDone('Calibration deleted'),
            onError: (error) => notifyProblem('Calibration not deleted', error),
            onSettled: () => setDoomed(null),
          })
        }
      >
        Its certificate goes with it, and recordings show an earlier calibration instead. This cannot be taken
        back. What an issued report refers to stays.
      </ConfirmDialog>
    </Sheet>
  );
}
