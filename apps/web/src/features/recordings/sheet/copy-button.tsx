import { Button } from '@chakra-ui/react';
import { notifyDone, notifyProblem } from '../../../components/notify.js';

/** Copies `text`; `label` names what is copied. */
export function CopyButton({ text, label }: { text: string; label: string }) {
  const copy = () =>
    navigator.clipboard.writeText(text).then(
      () => notifyDone(`${label} copied`),
      (error: unknown) => notifyProblem(`${label} not copied`, error),
    );
  return (
    <Button
      size="2xs"
      variant="ghost"
      px="1"
      mx="-1"
      onClick={() => void copy()}
      aria-label={`Copy the ${label}`}
    >
      Copy
    </Button>
  );
}
