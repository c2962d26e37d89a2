import { Box, chakra } from '@chakra-ui/react';
import { useLayoutEffect, useRef, useState, type PointerEvent, type ReactNode } from 'react';
import {
  bandPath,
  labelsThatFit,
  linePath,
  nearestIndex,
  placeOn,
  valueAtPlace,
  type ChartAxis,
  type Place,
} from './curve-geometry.js';

export type Tone = 'ink' | 'ink-soft' | 'act' | 'over' | 'near' | 'within' | 'rule' | 'rule-strong' | 'edge';

export interface ChartCurve {
  x: ArrayLike<number | null>;
  y: ArrayLike<number | null>;
  tone: Tone;
  width?: number;
  /** SVG dashes: "5 3". */
  dash?: string;
}

/** Bars of one kind at whole numbers; `shift` moves them beside others at the same place. Width and shift in px, less where places are close. */
export interface ChartBars {
  x: readonly number[];
  y: readonly (number | null)[];
  tones: readonly Tone[];
  shift?: number;
  width: number;
  isHollow?: boolean;
}

export interface ChartMark {
  x: number;
  y: number;
  tone: Tone;
  shape: 'dot' | 'ring' | 'cross';
  label?: string;
}

export interface ChartBand {
  x: ArrayLike<number>;
  low: ArrayLike<number>;
  high: ArrayLike<number>;
}

interface CurveChartProps {
  /** What the chart shows, for screen readers; its table twin carries the numbers. */
  label: string;
  height: number;
  x: ChartAxis;
  y: ChartAxis;
  band?: ChartBand | null;
  bars?: readonly ChartBars[];
  curves?: readonly ChartCurve[];
  marks?: readonly ChartMark[];
  /** Vertical lines behind the curves. */
  uprights?: readonly { x: number; tone: Tone; label?: string }[];
  /** Horizontal and vertical line through zero. */
  hasAxes?: boolean;
  /** Places under the pointer that are read out, with what is said of each. */
  readout?: { x: ArrayLike<number>; at: (index: number) => ReactNode };
}

const color = (token: Tone | 'sheet' | 'wash') => `var(--chakra-colors-${token})`;
const margin = { left: 60, right: 18, top: 10 };
const textStyle = { fontSize: 12, fill: color('ink-soft') } as const;

/** A chart as plain SVG: for curves that are drawn anew while a slider moves, where a charting library takes too long. */
export function CurveChart(props: CurveChartProps) {
  const { label, height, x, y } = props;
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box);
  const bottom = height - (x.title ? 40 : 24);
  const right = width - margin.right;
  const placeX = placeOn(x, margin.left, right);
  const placeY = placeOn(y, bottom, margin.top);
  return (
    <Box ref={box} role="figure" aria-label={label} w="full" h={`${height}px`} position="relative">
      {width > margin.left + 40 ? (
        <>
          <svg
            width={width}
            height={height}
            aria-hidden="true"
            style={{ display: 'block', fontFamily: 'inherit' }}
          >
            <Frame {...props} placeX={placeX} placeY={placeY} right={right} bottom={bottom} />
            <svg
              x={margin.left}
              y={margin.top - 4}
              width={right - margin.left}
              height={bottom - margin.top + 4}
              viewBox={`${margin.left} ${margin.top - 4} ${right - margin.left} ${bottom - margin.top + 4}`}
            >
              <Content {...props} placeX={placeX} placeY={placeY} right={right} bottom={bottom} />
            </svg>
          </svg>
          {props.readout ? (
            <Readout {...props} readout={props.readout} width={width} bottom={bottom} />
          ) : null}
        </>
      ) : null}
    </Box>
  );
}

interface Placed {
  placeX: Place;
  placeY: Place;
  right: number;
  bottom: number;
}

function Frame({ x, y, placeX, placeY, right, bottom }: CurveChartProps & Placed) {
  return (
    <g>
      {y.ticks.tickvals.map((value, i) => (
        <g key={value}>
          <path d={`M${margin.left} ${placeY(value).toFixed(1)}H${right}`} stroke={color('rule')} />
          <text x={margin.left - 8} y={placeY(value) + 4} textAnchor="end" {...textStyle}>
            {y.ticks.ticktext[i]}
          </text>
        </g>
      ))}
      <path d={`M${margin.left} ${bottom}H${right}`} stroke={color('ink-soft')} />
      {labelsThatFit(x.ticks, placeX).map((i) => (
        <text key={i} x={placeX(x.ticks.tickvals[i]!)} y={bottom + 16} textAnchor="middle" {...textStyle}>
          {x.ticks.ticktext[i]}
        </text>
      ))}
      {x.title ? (
        <text x={(margin.left + right) / 2} y={bottom + 34} textAnchor="middle" {...textStyle}>
          {x.title}
        </text>
      ) : null}
    </g>
  );
}

function Content(props: CurveChartProps & Placed) {
  const {
    x,
    y,
    band,
    bars = [],
    curves = [],
    marks = [],
    uprights = [],
    hasAxes,
    placeX,
    placeY,
    right,
    bottom,
  } = props;
  // Two bars and a gap find room between neighbouring whole numbers.
  const narrowed = (set: ChartBars) =>
    Math.min(1, (0.36 * Math.abs(placeX(x.from + 1) - placeX(x.from))) / set.width);
  const foot = Math.min(bottom, y.scale === 'log' ? bottom : placeY(Math.max(0, y.from)));
  return (
    <>
      {hasAxes ? (
        <path
          d={`M${margin.left} ${placeY(0).toFixed(1)}H${right}${x.from < 0 && x.to > 0 ? `M${placeX(0).toFixed(1)} 0V${bottom}` : ''}`}
          stroke={color('rule-strong')}
        />
      ) : null}
      {uprights.map(({ x: at, tone, label }) => (
        <g key={`${at} ${tone}`}>
          <path
            d={`M${placeX(at).toFixed(1)} ${margin.top}V${bottom}`}
            stroke={color(tone)}
            strokeDasharray="2 3"
          />
          {label ? (
            <text x={placeX(at) + 4} y={margin.top + 10} {...textStyle} fill={color(tone)}>
              {label}
            </text>
          ) : null}
        </g>
      ))}
      {band ? (
        <path
          className="band"
          d={bandPath(band.x, band.low, band.high, placeX, placeY)}
          fill={color('act')}
          opacity="0.16"
        />
      ) : null}
      {bars.map((set, index) =>
        set.x.map((at, i) => {
          const value = set.y[i];
          if (value === null || value === undefined || !(y.scale === 'linear' || value > y.from)) return null;
          const top = Math.max(0, Math.min(placeY(value), foot));
          const tone = color(set.tones[i] ?? 'ink');
          return (
            <rect
              key={`${index} ${at}`}
              x={placeX(at) + narrowed(set) * ((set.shift ?? 0) - set.width / 2)}
              y={top}
              width={set.width * narrowed(set)}
              height={Math.max(1, foot - top)}
              fill={set.isHollow ? color('sheet') : tone}
              stroke={tone}
            />
          );
        }),
      )}
      {curves.map((curve, index) => (
        <path
          key={index}
          className="curve"
          d={linePath(curve.x, curve.y, placeX, placeY)}
          fill="none"
          stroke={color(curve.tone)}
          strokeWidth={curve.width ?? 1.6}
          strokeDasharray={curve.dash}
          strokeLinejoin="round"
        />
      ))}
      {marks.map((mark, index) => (
        <MarkShape key={index} {...mark} px={placeX(mark.x)} py={placeY(mark.y)} />
      ))}
    </>
  );
}

function MarkShape({ shape, tone, label, px, py }: ChartMark & { px: number; py: number }) {
  if (!Number.isFinite(px) || !Number.isFinite(py)) return null;
  const stroke = color(tone);
  return (
    <g>
      {shape === 'cross' ? (
        <path d={`M${px - 5} ${py - 5}l10 10m0 -10l-10 10`} stroke={stroke} strokeWidth="1.8" />
      ) : (
        <circle
          cx={px}
          cy={py}
          r={shape === 'ring' ? 5 : 3.2}
          fill={shape === 'ring' ? 'none' : stroke}
          stroke={stroke}
          strokeWidth="1.6"
        />
      )}
      {label ? (
        <text x={px} y={py - 8} textAnchor="middle" {...textStyle} fill={stroke}>
          {label}
        </text>
      ) : null}
    </g>
  );
}

interface ReadoutProps extends CurveChartProps {
  readout: NonNullable<CurveChartProps['readout']>;
  width: number;
  bottom: number;
}

/** A hairline at the place under the pointer and what stands there. */
function Readout({ x, readout, width, bottom }: ReadoutProps) {
  const [pointer, setPointer] = useState<number | null>(null);
  const right = width - margin.right;
  const follow = (event: PointerEvent<HTMLDivElement>) =>
    setPointer(event.clientX - event.currentTarget.getBoundingClientRect().left);
  const isOver = pointer !== null && pointer >= margin.left && pointer <= right && readout.x.length > 0;
  const placeX = placeOn(x, margin.left, right);
  const index = isOver ? nearestIndex(readout.x, valueAtPlace(x, margin.left, right, pointer), placeX) : 0;
  const px = isOver ? placeX(readout.x[index]!) : 0;
  return (
    <Box position="absolute" inset="0" onPointerMove={follow} onPointerLeave={() => setPointer(null)}>
      {isOver ? (
        <>
          <Box
            position="absolute"
            left={`${px}px`}
            top={`${margin.top}px`}
            h={`${bottom - margin.top}px`}
            w="1px"
            bg="edge"
          />
          <chakra.div
            position="absolute"
            top="1"
            {...(px > width / 2 ? { right: `${width - px + 6}px` } : { left: `${px + 6}px` })}
            bg="sheet"
            borderWidth="1px"
            borderColor="ruleStrong"
            borderRadius="3px"
            px="2"
            py="1"
            fontSize="xs"
            whiteSpace="nowrap"
            pointerEvents="none"
          >
            {readout.at(index)}
          </chakra.div>
        </>
      ) : null}
    </Box>
  );
}

/** Width of an element in px, followed when it changes; 640 where nothing is laid out. */
function useWidth(box: React.RefObject<HTMLDivElement | null>): number {
  const [width, setWidth] = useState(640);
  useLayoutEffect(() => {
    const element = box.current;
    if (!element) return;
    const measure = () => setWidth(Math.round(element.clientWidth) || 640);
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [box]);
  return width;
}
