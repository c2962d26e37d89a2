import { useEffect, useState, type RefObject } from 'react';

/** What of a scrolled table is out of sight. */
export interface HiddenRows {
  rowsBelow: number;
  columnsRight: boolean;
}

const nothing: HiddenRows = { rowsBelow: 0, columnsRight: false };
/** Less than this many px out of sight is no row. */
const slack = 6;

function measure(box: HTMLElement): HiddenRows {
  const rows = [...box.querySelectorAll('tbody > tr')];
  const edge = box.getBoundingClientRect().bottom;
  const isBelow = (row: Element) => row.getBoundingClientRect().bottom > edge + slack;
  const scrolls = box.scrollHeight - box.clientHeight > slack;
  return {
    rowsBelow: scrolls ? rows.filter(isBelow).length : 0,
    columnsRight: box.scrollWidth - box.clientWidth - box.scrollLeft > slack,
  };
}

/** Follows how many rows of the table in `box` lie below its edge, and whether columns lie to its right. */
export function useHiddenRows(box: RefObject<HTMLElement | null>, rowCount: number): HiddenRows {
  const [hidden, setHidden] = useState(nothing);
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const update = () =>
      setHidden((before) => {
        const now = measure(element);
        const isSame = now.rowsBelow === before.rowsBelow && now.columnsRight === before.columnsRight;
        return isSame ? before : now;
      });
    const observer = new ResizeObserver(update);
    observer.observe(element);
    element.addEventListener('scroll', update, { passive: true });
    update();
    return () => {
      observer.disconnect();
      element.removeEventListener('scroll', update);
    };
  }, [box, rowCount]);
  return hidden;
}

/** "36 more rows below, more columns to the right"; null when all is in sight. */
export function hiddenWords({ rowsBelow, columnsRight }: HiddenRows): string | null {
  const parts = [];
  if (rowsBelow > 0) parts.push(rowsBelow === 1 ? '1 more row below' : `${rowsBelow} more rows below`);
  if (columnsRight) parts.push('more columns to the right');
  return parts.length > 0 ? parts.join(', ') : null;
}
