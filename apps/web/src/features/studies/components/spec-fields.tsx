import { LoopFields } from './loop-fields.js';
import { OpenFields, type SpecFieldsProps } from './open-fields.js';

/** Fields of a stage, whatever describes it. */
export function SpecFields({ spec, ...props }: SpecFieldsProps) {
  return spec.kind === 'closed-loop' ? (
    <LoopFields {...props} spec={spec} />
  ) : (
    <OpenFields {...props} spec={spec} />
  );
}
