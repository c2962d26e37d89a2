import { createToaster } from '@chakra-ui/react';
import { problemText } from '../lib/api-problem.js';

export const toaster = createToaster({ placement: 'bottom-end', pauseOnPageIdle: true, duration: 6000 });

/** Says that something was done; `undo` offers the way back. */
export function notifyDone(title: string, undo?: () => void): void {
  toaster.create({
    title,
    type: 'success',
    duration: undo ? 10_000 : 6000,
    ...(undo ? { action: { label: 'Undo', onClick: undo } } : {}),
  });
}

/** Says that something was not done, and why. Stays until it is closed. */
export function notifyProblem(title: string, error: unknown): void {
  toaster.create({ title, description: problemText(error), type: 'error', duration: Infinity });
}
