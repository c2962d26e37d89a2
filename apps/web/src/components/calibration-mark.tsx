import { chakra, Flex } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { standingWords, type CalibrationStanding } from '../lib/calibration-words.js';

const tones: Record<CalibrationStanding, string> = {
  valid: 'within',
  'due-soon': 'near',
  overdue: 'over',
  none: 'over',
};

/** Ring with a tick, a hand, a stroke or nothing in it: told apart without colour. */
const marks: Record<CalibrationStanding, ReactNode> = {
  valid: <path d="M5 8.2l2.2 2.2L11 6.2" />,
  'due-soon': <path d="M8 4.8V8l2.3 1.6" />,
  overdue: <path d="M8 4.4v4.2M8 10.9v.6" />,
  none: <path d="M5.2 8h5.6" />,
};

/** State of a calibration by mark and words. */
export function CalibrationMark({ standing, words }: { standing: CalibrationStanding; words?: string }) {
  return (
    <Flex as="span" display="inline-flex" align="center" gap="1.5" color={tones[standing]} fontWeight="600">
      <chakra.svg
        viewBox="0 0 16 16"
        w="16px"
        h="16px"
        flexShrink="0"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
        aria-hidden="true"
      >
        <circle cx="8" cy="8" r="6.6" />
        {marks[standing]}
      </chakra.svg>
      {words ?? standingWords[standing]}
    </Flex>
  );
}
