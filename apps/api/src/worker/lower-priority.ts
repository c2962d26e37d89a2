import { readlinkSync } from 'node:fs';
import { getPriority, setPriority } from 'node:os';

const steps = 5;

/**
 * Lets the calling thread give way to the others of the process, so that requests are answered first where processors
 * are few. Linux keeps a priority for each thread under its own number; elsewhere nothing is changed.
 */
export function lowerThreadPriority(): void {
  if (process.platform !== 'linux') return;
  const threadNumber = Number(readlinkSync('/proc/thread-self').split('/').at(-1));
  setPriority(threadNumber, Math.min(19, getPriority() + steps));
}
