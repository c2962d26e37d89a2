import { Box, Button, Flex, Heading, Link, Stack, Text } from '@chakra-ui/react';
import { equipmentLine, type Equipment } from '@overtally/contracts';
import { useState } from 'react';
import { Link as RouterLink } from 'react-router-dom';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Sheet } from '../../../components/sheet.js';
import { formatDay } from '../../../lib/calibration-words.js';
import { useEquipmentChanges } from '../hooks/use-equipment-changes.js';
import { RatingPlate } from './rating-plate.js';

interface EquipmentListProps {
  projectId: string;
  equipment: readonly Equipment[];
  /** The list of recordings of one piece. */
  recordingsTo: (equipmentId: string) => string;
  mayWrite: boolean;
  onEdit: (equipment: Equipment) => void;
}

/** Equipment with its rating plate, its operating modes and how often each was recorded. */
export function EquipmentList({ projectId, equipment, recordingsTo, mayWrite, onEdit }: EquipmentListProps) {
  const [doomed, setDoomed] = useState<Equipment | null>(null);
  const { update, remove } = useEquipmentChanges(projectId);
  const retire = ({ id, name }: Equipment, retired: boolean) =>
    update.mutate(
      { id, change: { retired } },
      {
        onSuccess: () => notifyDone(retired ? `${name} retired` : `${name} is in use again`),
        onError: (error) => notifyProblem(`${name} not changed`, error),
      },
    );
  return (
    <Stack as="ul" gap="3" listStyleType="none">
      {equipment.map((piece) => (
        <li key={piece.id}>
          <Sheet p="4" opacity={piece.retiredAt ? 0.85 : 1}>
            <Flex justify="space-between" gap="4" wrap="wrap" mb="2">
              <Box minW="0">
                <Heading as="h2" fontSize="md" overflowWrap="anywhere">
                  {piece.name}
                  {piece.retiredAt ? ' (retired)' : ''}
                </Heading>
                <Text color="inkSoft" fontSize="13px" overflowWrap="anywhere">
                  {equipmentLine({ ...piece, name: '' }) || 'No manufacturer, model or serial number entered'}
                  {piece.receivedOn ? `; received on ${formatDay(piece.receivedOn)}` : ''}
                </Text>
              </Box>
              {mayWrite ? (
                <Flex gap="2" wrap="wrap" align="flex-start">
                  <Button size="sm" aria-label={`Edit ${piece.name}`} onClick={() => onEdit(piece)}>
                    Edit
                  </Button>
                  <Button
                    size="sm"
                    aria-label={`${piece.retiredAt ? 'Use again' : 'Retire'} ${piece.name}`}
                    onClick={() => retire(piece, piece.retiredAt === null)}
                  >
                    {piece.retiredAt ? 'Use again' : 'Retire'}
                  </Button>
                  {piece.recordings === 0 ? (
                    <Button size="sm" aria-label={`Delete ${piece.name}`} onClick={() => setDoomed(piece)}>
                      Delete
                    </Button>
                  ) : null}
                </Flex>
              ) : null}
            </Flex>
            <RatingPlate ratings={piece.ratings} label={`Rating plate of ${piece.name}`} />
            <Text mt="2" fontSize="sm">
              {piece.operatingModes.length === 0 ? (
                <Box as="span" color="inkSoft">
                  No operating modes entered
                </Box>
              ) : (
                piece.operatingModes.map(modeWords).join(', ')
              )}
            </Text>
            <Text mt="1" fontSize="sm">
              {piece.recordings > 0 ? (
                <Link asChild>
                  <RouterLink to={recordingsTo(piece.id)}>{countWords(piece.recordings)}</RouterLink>
                </Link>
              ) : (
                <Box as="span" color="inkSoft">
                  Not recorded yet
                </Box>
              )}
            </Text>
          </Sheet>
        </li>
      ))}
      <ConfirmDialog
        open={doomed !== null}
        onClose={() => setDoomed(null)}
        title={`Delete ${doomed?.name ?? ''}?`}
        confirmLabel="Delete"
        destructive
        pending={remove.isPending}
        onConfirm={() =>
          remove.mutate(doomed!, {
            onSuccess: () => notifyDone(`${doomed!.name} deleted`),
            onError: (error) => notifyProblem(`${doomed!.name} not deleted`, error),
            onSettled: () => setDoomed(null),
          })
        }
      >
        Its ratings and operating modes are lost. This cannot be taken back.
      </ConfirmDialog>
    </Stack>
  );
}

const countWords = (count: number) => (count === 1 ? '1 recording' : `${count} recordings`);

function modeWords({ name, recordings, retired }: Equipment['operatingModes'][number]): string {
  const notes = [recordings > 0 ? countWords(recordings) : '', retired ? 'retired' : ''].filter(Boolean);
  return notes.length > 0 ? `${name} (${notes.join(', ')})` : name;
}
