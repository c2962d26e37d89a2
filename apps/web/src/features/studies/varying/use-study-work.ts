import { useEffect, useRef, useState } from 'react';
import type { StudyOutcome, StudyReply, StudyWork } from './study.worker.js';

export type WorkState<O> =
  | { kind: 'idle' }
  | { kind: 'running'; progress: number }
  | { kind: 'done'; outcome: O }
  | { kind: 'failed'; fault: string };

/** Work in a thread of its own, one at a time, with its progress; the page leaves it behind when it closes. */
export function useStudyWork<O extends StudyOutcome>(onDone: (outcome: O) => void) {
  const worker = useRef<Worker | null>(null);
  const [state, setState] = useState<WorkState<O>>({ kind: 'idle' });
  const stop = () => {
    worker.current?.terminate();
    worker.current = null;
  };
  useEffect(() => stop, []);
  const run = (work: Extract<StudyWork, { kind: O['kind'] }>) => {
    stop();
    setState({ kind: 'running', progress: 0 });
    const thread = new Worker(new URL('./study.worker.ts', import.meta.url), { type: 'module' });
    worker.current = thread;
    thread.onmessage = ({ data }: MessageEvent<StudyReply>) => {
      if ('progress' in data) return setState({ kind: 'running', progress: data.progress });
      stop();
      if ('fault' in data) return setState({ kind: 'failed', fault: data.fault });
      const outcome = data.outcome as O;
      setState({ kind: 'done', outcome });
      onDone(outcome);
    };
    thread.onerror = ({ message }) => {
      stop();
      setState({ kind: 'failed', fault: message });
    };
    thread.postMessage(work);
  };
  const cancel = () => {
    stop();
    setState({ kind: 'idle' });
  };
  return { state, run, cancel };
}
