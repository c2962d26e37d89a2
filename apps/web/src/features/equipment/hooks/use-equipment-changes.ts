import type { CreateEquipment, Equipment, UpdateEquipment } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createEquipment, deleteEquipment, updateEquipment } from '../api/write-equipment.js';

/** Entering, changing and deleting equipment; what names it follows. */
export function useEquipmentChanges(projectId: string) {
  const queryClient = useQueryClient();
  const onSettled = () => queryClient.invalidateQueries({ queryKey: ['projects', projectId] });
  return {
    save: useMutation({
      mutationFn: ({ before, values }: { before: Equipment | null; values: CreateEquipment }) =>
        before ? updateEquipment(before.id, values) : createEquipment(projectId, values),
      onSettled,
    }),
    update: useMutation({
      mutationFn: ({ id, change }: { id: string; change: UpdateEquipment }) => updateEquipment(id, change),
      onSettled,
    }),
    remove: useMutation({ mutationFn: ({ id }: Equipment) => deleteEquipment(id), onSettled }),
  };
}
