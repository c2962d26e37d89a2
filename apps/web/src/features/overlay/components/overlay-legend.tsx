import { Button, Flex, IconButton, Link, Text } from '@chakra-ui/react';
import type { LimitSet, Recording } from '@overtally/contracts';
import { sharesOfSummary } from '@overtally/limits';
import { Link as RouterLink } from 'react-router-dom';
import { MarginColumn, MarginItem } from '../../../components/margin-column.js';
import { tallyWords } from '../../../components/tally-geometry.js';
import { TallyStrip } from '../../../components/tally-strip.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import type { OverlayEntry } from '../overlay-link.js';
import { entryKey } from '../overlay-link.js';
import type { OverlaySeries } from '../series.js';
import { LineSwatch } from './line-swatch.js';

/** One channel of the overlay and how far it has come. */
export interface LegendItem {
  entry: OverlayEntry;
  recording: Recording | null;
  series: OverlaySeries | null;
  /** Why there is nothing to show of it; null while all is well or loading. */
  problem: string | null;
  onRetry?: () => void;
}

interface OverlayLegendProps {
  items: readonly LegendItem[];
  /** Set for the tally strips; null for none. */
  limitSet: LimitSet | null;
  recordingTo: (recordingId: string) => string;
  onAdd: () => void;
  onMove: (index: number, by: -1 | 1) => void;
  onRemove: (index: number) => void;
}

/** The channels beside the figure: line, name, tally strip; to reorder and to remove. */
export function OverlayLegend(props: OverlayLegendProps) {
  const { items, limitSet, onAdd } = props;
  const shown = limitSet && limitSet.parameters.length === 0 ? limitSet : null;
  return (
    <MarginColumn
      title={`Channels, ${items.length} of 12`}
      actions={
        <Button size="xs" onClick={onAdd} disabled={items.length >= 12}>
          {items.length >= 12 ? 'Full' : 'Add channels'}
        </Button>
      }
    >
      {items.map((item, index) => (
        <Entry key={entryKey(item.entry)} {...props} item={item} index={index} limitSet={shown} />
      ))}
      {shown ? (
        <Text color="inkSoft" fontSize="xs" pt="2">
          Strips: share of {limitSetName(shown)}, orders 2 to 40. A comparison is not a verdict.
        </Text>
      ) : null}
    </MarginColumn>
  );
}

function Entry(props: OverlayLegendProps & { item: LegendItem; index: number }) {
  const { item, index, items, limitSet, recordingTo, onMove, onRemove } = props;
  const { entry, recording, series, problem } = item;
  const label = series?.label ?? recording?.number ?? 'Channel';
  const fits = limitSet !== null && limitSet.quantity === series?.summary.quantity;
  const shares = fits && series ? sharesOfSummary(limitSet, series.summary) : [];
  const words = tallyWords(shares);
  return (
    <MarginItem>
      <Flex align="center" gap="2.5">
        <LineSwatch style={entry.style} />
        <Link asChild fontWeight="600" color="ink" minW="0" overflowWrap="anywhere">
          <RouterLink to={recordingTo(entry.recordingId)}>{label}</RouterLink>
        </Link>
        <Flex ml="auto" flexShrink="0">
          <Tool
            label={`Move ${label} up`}
            mark="↑"
            disabled={index === 0}
            onClick={() => onMove(index, -1)}
          />
          <Tool
            label={`Move ${label} down`}
            mark="↓"
            disabled={index === items.length - 1}
            onClick={() => onMove(index, 1)}
          />
          <Tool label={`Remove ${label}`} mark="×" onClick={() => onRemove(index)} />
        </Flex>
      </Flex>
      <Text fontSize="13px">{recording?.name ?? (problem ? '' : 'Loading')}</Text>
      {problem ? (
        <Text role="alert" fontSize="13px" color="over">
          {problem}{' '}
          {item.onRetry ? (
            <Button size="xs" variant="plain" px="0" h="auto" color="act" onClick={item.onRetry}>
              Try again
            </Button>
          ) : null}
        </Text>
      ) : null}
      {fits ? (
        <Flex direction="column" gap="0.5" mt="1">
          <TallyStrip shares={shares} label={words} />
          <Text fontSize="xs" color={words.startsWith('over') ? 'over' : 'inkSoft'}>
            {words}
          </Text>
        </Flex>
      ) : null}
    </MarginItem>
  );
}

function Tool(props: { label: string; mark: string; disabled?: boolean; onClick: () => void }) {
  return (
    <IconButton
      size="2xs"
      variant="ghost"
      colorPalette="gray"
      aria-label={props.label}
      title={props.label}
      disabled={props.disabled ?? false}
      onClick={props.onClick}
    >
      {props.mark}
    </IconButton>
  );
}
