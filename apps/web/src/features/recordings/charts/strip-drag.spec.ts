import { describe, expect, it } from 'vitest';
import { draggedSpan, gripAt } from './strip-drag.js';

const view = { fromS: 4, toS: 6 };

describe('dragging in the overview', () => {
  it('takes hold of edges, of the window between them, or of neither', () => {
    expect([3.95, 5, 6.05, 1].map((atS) => gripAt(atS, view, 0.1))).toEqual(['from', 'window', 'to', 'new']);
  });

  it('moves a window that is too narrow for edges', () => {
    expect(gripAt(4, { fromS: 4, toS: 4.2 }, 0.1)).toBe('window');
  });

  it('moves, stretches or draws anew, and never turns around', () => {
    expect(draggedSpan({ grip: 'window', atS: 5, view }, 7)).toEqual({ fromS: 6, toS: 8 });
    expect(draggedSpan({ grip: 'from', atS: 4, view }, 9)).toEqual({ fromS: 6, toS: 6 });
    expect(draggedSpan({ grip: 'to', atS: 6, view }, 8)).toEqual({ fromS: 4, toS: 8 });
    expect(draggedSpan({ grip: 'new', atS: 3, view }, 1)).toEqual({ fromS: 1, toS: 3 });
  });
});
