import { Text } from '@chakra-ui/react';
import { MarginItem } from '../../../components/margin-column.js';

/** The caution at the foot of the margin. */
export function MainsCaution() {
  return (
    <MarginItem>
      <Text color="inkSoft" fontSize="xs">
        Work on mains can kill: qualified persons, rated probes, isolation, local codes. A comparison or
        verdict here is not a certificate.
      </Text>
    </MarginItem>
  );
}
