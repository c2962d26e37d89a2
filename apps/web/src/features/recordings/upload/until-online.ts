/** Seconds before the next try where nothing tells that the connection is back. */
const pauseS = 15;

/** Waits until the browser says that it is online again, or some seconds. Rejects once `signal` fires. */
export function untilOnline(signal: AbortSignal, afterS: number | null): Promise<void> {
  return new Promise((resolve, reject) => {
    const end = (act: () => void) => () => {
      clearTimeout(timer);
      window.removeEventListener('online', goOn);
      signal.removeEventListener('abort', giveUp);
      act();
    };
    const goOn = end(resolve);
    const giveUp = end(() => reject(new DOMException('Stopped', 'AbortError')));
    const timer = setTimeout(goOn, 1000 * (afterS ?? pauseS));
    window.addEventListener('online', goOn);
    signal.addEventListener('abort', giveUp);
    if (signal.aborted) giveUp();
  });
}
