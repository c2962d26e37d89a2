import { useCallback } from 'react';
import { LoopFields, type LoopSpec } from './loop-fields.js';
import { OpenFields, type Edit, type OpenSpec, type SpecFieldsProps } from './open-fields.js';

/** Fields of a stage, whatever describes it. */
export function SpecFields({ spec, onEdit, ...props }: SpecFieldsProps) {
  const onOpen = useCallback<Edit<OpenSpec>>(
    (edit, isSliding) => onEdit((held) => (held.kind === 'closed-loop' ? held : edit(held)), isSliding),
    [onEdit],
  );
  const onLoop = useCallback<Edit<LoopSpec>>(
    (edit, isSliding) => onEdit((held) => (held.kind === 'closed-loop' ? edit(held) : held), isSliding),
    [onEdit],
  );
  return spec.kind === 'closed-loop' ? (
    <LoopFields {...props} spec={spec} onEdit={onLoop} />
  ) : (
    <OpenFields {...props} spec={spec} onEdit={onOpen} />
  );
}
