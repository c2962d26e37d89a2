import { useEffect, useState } from 'react';

/** `value` once it has stayed the same for `ms`, so that dragging does not ask the server at every step. */
export function useSettled<T>(value: T, ms: number): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), ms);
    return () => clearTimeout(timer);
  }, [value, ms]);
  return settled;
}
