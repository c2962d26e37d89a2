import { Segmented } from '../../../components/segmented.js';
import type { OverlayView } from '../overlay-link.js';

interface OverlayTogglesProps {
  view: OverlayView;
  onChange: (changes: Partial<OverlayView>) => void;
}

/** What the axes show. */
export function OverlayToggles({ view, onChange }: OverlayTogglesProps) {
  return (
    <>
      <Segmented
        label="Along the axis"
        value={view.by}
        options={[
          { value: 'order', label: 'Order' },
          { value: 'frequency', label: 'Frequency' },
        ]}
        onChange={(by) => onChange({ by })}
      />
      <Segmented
        label="Orders shown"
        value={view.orders}
        options={[
          { value: 'all', label: 'All' },
          { value: 'odd', label: 'Odd' },
        ]}
        onChange={(orders) => onChange({ orders })}
      />
      <Segmented
        label="Amplitudes"
        value={view.amplitude}
        options={[
          { value: 'absolute', label: 'Absolute' },
          { value: 'relative', label: 'Relative' },
        ]}
        onChange={(amplitude) => onChange({ amplitude })}
      />
      <Segmented
        label="Scale"
        value={view.scale}
        options={[
          { value: 'log', label: 'Log' },
          { value: 'linear', label: 'Linear' },
        ]}
        onChange={(scale) => onChange({ scale })}
      />
    </>
  );
}
