import { moved, type Span } from './span.js';

/** What a pointer takes hold of: an edge of the window, the window, or a place beside it. */
type Grip = 'from' | 'to' | 'window' | 'new';

/** A drag under way: where it began and what was in view then. */
export interface Held {
  grip: Grip;
  atS: number;
  view: Span;
}

/** What a pointer at `atS` takes hold of. A window too narrow for edges is moved as a whole. */
export function gripAt(atS: number, view: Span, reachS: number): Grip {
  const inside = atS >= view.fromS - reachS && atS <= view.toS + reachS;
  if (!inside) return 'new';
  if (view.toS - view.fromS < 4 * reachS) return 'window';
  if (Math.abs(atS - view.fromS) <= reachS) return 'from';
  if (Math.abs(atS - view.toS) <= reachS) return 'to';
  return 'window';
}

/** The span after dragging to `atS`. */
export function draggedSpan(held: Held, atS: number): Span {
  const { grip, view } = held;
  switch (grip) {
    case 'from':
      return { fromS: Math.min(atS, view.toS), toS: view.toS };
    case 'to':
      return { fromS: view.fromS, toS: Math.max(atS, view.fromS) };
    case 'window':
      return moved(view, atS - held.atS);
    case 'new':
      return { fromS: Math.min(held.atS, atS), toS: Math.max(held.atS, atS) };
  }
}
