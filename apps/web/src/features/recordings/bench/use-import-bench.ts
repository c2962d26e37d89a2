import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { chainsQuery, equipmentQuery } from '../../../lib/bench-queries.js';
import { benchSchema, emptyBench, fromBench, stillOffered, type BenchValues } from './bench-values.js';

const placeOf = (projectId: string) => `overtally.bench.${projectId}`;

/** What the captures of this project were last said to be of, on this computer. */
function remembered(projectId: string): BenchValues {
  const text = localStorage.getItem(placeOf(projectId));
  if (text === null) return emptyBench;
  try {
    return benchSchema.safeParse(JSON.parse(text)).data ?? emptyBench;
  } catch (error) {
    if (error instanceof SyntaxError) return emptyBench;
    throw error;
  }
}

/** What is said of every capture that comes in; kept for the next import in the project. */
export function useImportBench(projectId: string) {
  const equipment = useQuery(equipmentQuery(projectId)).data;
  const chains = useQuery(chainsQuery()).data;
  const [kept, setKept] = useState(() => remembered(projectId));
  const values = stillOffered(kept, equipment ?? [], chains ?? []);
  const keep = (next: BenchValues) => {
    localStorage.setItem(placeOf(projectId), JSON.stringify(next));
    setKept(next);
  };
  const piece = equipment?.find(({ id }) => id === values.equipmentId);
  const mode = piece?.operatingModes.find(({ id }) => id === values.operatingModeId);
  const chain = chains?.find(({ id }) => id === values.measuringChainId);
  const isEmpty = Object.values(values).every((text) => text === '');
  return {
    values,
    keep,
    names: [piece?.name, mode?.name, chain?.name].filter((name) => name !== undefined),
    isEmpty,
    /** What goes with an upload; nothing where nothing is said. */
    data: isEmpty ? {} : fromBench(values),
  };
}
