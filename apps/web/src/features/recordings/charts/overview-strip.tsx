import { Box, chakra } from '@chakra-ui/react';
import type { Waveform } from '@overtally/contracts';
import { useMemo, useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { formatDuration } from '../../../lib/format.js';
import { overviewPath } from './overview-path.js';
import { clampSpan, moved, resized, type Span } from './span.js';
import { draggedSpan, gripAt, type Held } from './strip-drag.js';

interface OverviewStripProps {
  /** The whole record; null while it is fetched. */
  waveform: Waveform | null;
  durationS: number;
  view: Span;
  /** Shortest span that makes sense, in seconds. */
  leastS: number;
  onView: (view: Span) => void;
  /** Part of the record that was analysed, where it is not all of it. */
  analysed?: Span | null;
}

const width = 1000;
const height = 34;
/** Pointer distance to an edge of the window that takes hold of the edge, in px. */
const edgeReach = 8;

/**
 * The whole record with a window on the part in view. The window is dragged, its edges stretch it, a drag beside it
 * draws a new one; arrows move it by a quarter, Page Up and Page Down by its length, + and − change the length.
 */
export function OverviewStrip(props: OverviewStripProps) {
  const { waveform, durationS, view, leastS, onView, analysed = null } = props;
  const strip = useRef<HTMLDivElement>(null);
  const path = useMemo(() => (waveform ? overviewPath(waveform, width, height) : ''), [waveform]);
  const show = (span: Span) => onView(clampSpan(span, durationS, leastS));
  const drag = useDrag(strip, { durationS, view, show });
  const left = (100 * view.fromS) / durationS;
  const share = (100 * (view.toS - view.fromS)) / durationS;
  return (
    <Box
      ref={strip}
      position="relative"
      h={`${height}px`}
      cursor="crosshair"
      {...drag}
      css={{ touchAction: 'none' }}
    >
      <chakra.svg
        viewBox={`0 0 ${width} ${height}`}
        preserveAspectRatio="none"
        w="full"
        h="full"
        display="block"
        aria-hidden="true"
      >
        <chakra.path d={path} fill="ruleStrong" />
      </chakra.svg>
      {analysed ? (
        <>
          <Veil fromS={0} toS={analysed.fromS} durationS={durationS} />
          <Veil fromS={analysed.toS} toS={durationS} durationS={durationS} />
        </>
      ) : null}
      <Box
        role="slider"
        tabIndex={0}
        aria-label="Part of the record in view"
        aria-valuemin={0}
        aria-valuemax={durationS}
        aria-valuenow={view.fromS}
        aria-valuetext={`${formatDuration(view.toS - view.fromS)} from ${formatDuration(view.fromS)}`}
        onKeyDown={(event) => onKey(event, view, durationS, show)}
        position="absolute"
        top="0"
        bottom="0"
        left={`min(${left}%, calc(100% - 6px))`}
        w={`max(${share}%, 6px)`}
        bg="act/15"
        borderWidth="1px"
        borderColor="act"
        cursor="grab"
      />
    </Box>
  );
}

/** Lies over what was not analysed. */
function Veil({ fromS, toS, durationS }: Span & { durationS: number }) {
  if (!(toS > fromS)) return null;
  return (
    <Box
      position="absolute"
      top="0"
      bottom="0"
      left={`${(100 * fromS) / durationS}%`}
      w={`${(100 * (toS - fromS)) / durationS}%`}
      bg="sheet/75"
      pointerEvents="none"
    />
  );
}

function onKey(event: KeyboardEvent, view: Span, durationS: number, show: (span: Span) => void): void {
  const length = view.toS - view.fromS;
  const steps: Record<string, Span> = {
    ArrowLeft: moved(view, -length / 4),
    ArrowDown: moved(view, -length / 4),
    ArrowRight: moved(view, length / 4),
    ArrowUp: moved(view, length / 4),
    PageDown: moved(view, -length),
    PageUp: moved(view, length),
    Home: { fromS: 0, toS: length },
    End: { fromS: durationS - length, toS: durationS },
    '+': resized(view, 0.5),
    '-': resized(view, 2),
  };
  const wanted = steps[event.key];
  if (!wanted) return;
  event.preventDefault();
  show(wanted);
}

/** Pointer handlers of the strip; what was taken hold of decides what a drag does. */
function useDrag(
  strip: { current: HTMLDivElement | null },
  { durationS, view, show }: { durationS: number; view: Span; show: (span: Span) => void },
) {
  const held = useRef<Held | null>(null);
  const place = (event: PointerEvent) => {
    const box = strip.current?.getBoundingClientRect();
    if (!box || box.width === 0) return { atS: 0, perPxS: 0 };
    return { atS: ((event.clientX - box.left) / box.width) * durationS, perPxS: durationS / box.width };
  };
  return {
    onPointerDown: (event: PointerEvent) => {
      const { atS, perPxS } = place(event);
      held.current = { grip: gripAt(atS, view, edgeReach * perPxS), atS, view };
      strip.current?.setPointerCapture(event.pointerId);
    },
    onPointerMove: (event: PointerEvent) => {
      const { current } = held;
      if (current) show(draggedSpan(current, place(event).atS));
    },
    onPointerUp: (event: PointerEvent) => {
      const { current } = held;
      held.current = null;
      // A click beside the window brings it there.
      if (current?.grip === 'new' && Math.abs(place(event).atS - current.atS) < 4 * place(event).perPxS) {
        show(moved(current.view, current.atS - (current.view.fromS + current.view.toS) / 2));
      }
    },
    onPointerCancel: () => {
      held.current = null;
    },
  };
}
