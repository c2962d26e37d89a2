import { Box, chakra, Flex, Heading, Text } from '@chakra-ui/react';
import { useId, useState, type ReactNode } from 'react';
import { Segmented } from './segmented.js';
import { Sheet } from './sheet.js';

interface FigureFrameProps {
  title: string;
  /** What the figure is made of: mean of 150 windows of 10 cycles. */
  subtitle?: ReactNode;
  /** Key figures at the right. */
  figures?: readonly { label: string; value: string }[];
  /** Text toggles at the right. */
  toggles?: ReactNode;
  /** Table twin of the figure; adds the switch between the two. */
  table?: ReactNode;
  /** Stands under the figure and under its table. */
  foot?: ReactNode;
  children: ReactNode;
}

/** Frame of a chart: what it shows, its key figures, its toggles and its table twin. */
export function FigureFrame(props: FigureFrameProps) {
  const { title, subtitle, figures = [], toggles, table, foot, children } = props;
  const id = useId();
  const [view, setView] = useState<'figure' | 'table'>('figure');
  const showsTable = view === 'table' && table !== undefined;
  return (
    <Sheet as="section" aria-labelledby={id} px={{ base: '3', md: '4' }} py="3" mb="4">
      <Flex justify="space-between" align="baseline" wrap="wrap" columnGap="5" rowGap="1" mb="2">
        <Flex align="baseline" wrap="wrap" columnGap="3.5">
          <Heading as="h2" id={id} fontSize="sm" lineHeight="1.45">
            {title}
          </Heading>
          {subtitle ? (
            <Text color="inkSoft" fontSize="13px">
              {subtitle}
            </Text>
          ) : null}
        </Flex>
        <Flex align="baseline" wrap="wrap" columnGap="3.5" rowGap="1">
          {figures.map((figure) => (
            <Text key={figure.label} fontSize="13px" color="inkSoft">
              {figure.label}{' '}
              <chakra.span fontFamily="mono" fontWeight="600" color="ink">
                {figure.value}
              </chakra.span>
            </Text>
          ))}
          {toggles}
          {table === undefined ? null : (
            <Segmented
              label={`${title}: shown as`}
              value={view}
              options={[
                { value: 'figure', label: 'Figure' },
                { value: 'table', label: 'Table' },
              ]}
              onChange={setView}
            />
          )}
        </Flex>
      </Flex>
      <Box minW="0">{showsTable ? table : children}</Box>
      {foot}
    </Sheet>
  );
}
