import type { StudyDefinition } from '@overtally/contracts';
import type { ReactNode } from 'react';
import { useDraftPart, useStudyStore } from '../study-store.js';

export interface JudgementSlotProps {
  quantity: StudyDefinition['outputQuantity'];
  judgement: StudyDefinition['judgement'];
  disabled: boolean;
  onChange: (judgement: StudyDefinition['judgement']) => void;
}

/** Limits that input and output are judged by; the fields come from outside. */
export function JudgementPart({
  disabled,
  fields,
}: {
  disabled: boolean;
  fields: (props: JudgementSlotProps) => ReactNode;
}) {
  const store = useStudyStore();
  const judgement = useDraftPart((draft) => draft.judgement);
  const quantity = useDraftPart((draft) => draft.outputQuantity);
  return fields({
    ...{ quantity, judgement, disabled },
    onChange: (next) => store.change((draft) => ({ ...draft, judgement: next })),
  });
}
