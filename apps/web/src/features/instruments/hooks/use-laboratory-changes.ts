import type {
  CreateCalibration,
  CreateInstrument,
  UpdateChain,
  UpdateInstrument,
  WriteChain,
} from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createCalibration, deleteCalibration } from '../api/write-calibration.js';
import { createChain, deleteChain, updateChain } from '../api/write-chain.js';
import { createInstrument, deleteInstrument, updateInstrument } from '../api/write-instrument.js';

/** Changes of instruments, calibrations and chains; every list of them follows, and recordings that name them. */
export function useLaboratoryChanges() {
  const queryClient = useQueryClient();
  const onSettled = () =>
    Promise.all([
      queryClient.invalidateQueries({ queryKey: ['laboratory'] }),
      queryClient.invalidateQueries({ queryKey: ['projects'] }),
    ]);
  return {
    saveInstrument: useMutation({
      mutationFn: ({ id, values }: { id: string | null; values: CreateInstrument }) =>
        id === null ? createInstrument(values) : updateInstrument(id, values),
      onSettled,
    }),
    changeInstrument: useMutation({
      mutationFn: ({ id, change }: { id: string; change: UpdateInstrument }) => updateInstrument(id, change),
      onSettled,
    }),
    removeInstrument: useMutation({ mutationFn: (id: string) => deleteInstrument(id), onSettled }),
    addCalibration: useMutation({
      mutationFn: (given: {
        instrumentId: string;
        calibration: CreateCalibration;
        certificate: File | null;
      }) => createCalibration(given.instrumentId, given.calibration, given.certificate),
      onSettled,
    }),
    removeCalibration: useMutation({ mutationFn: (id: string) => deleteCalibration(id), onSettled }),
    saveChain: useMutation({
      mutationFn: ({ id, values }: { id: string | null; values: WriteChain }) =>
        id === null ? createChain(values) : updateChain(id, values),
      onSettled,
    }),
    changeChain: useMutation({
      mutationFn: ({ id, change }: { id: string; change: UpdateChain }) => updateChain(id, change),
      onSettled,
    }),
    removeChain: useMutation({ mutationFn: (id: string) => deleteChain(id), onSettled }),
  };
}
