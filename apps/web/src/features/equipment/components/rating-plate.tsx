import { Box, chakra, Text } from '@chakra-ui/react';
import type { EquipmentRatings } from '@overtally/contracts';
import { ratingWords } from '../rating-words.js';

/** Ratings as they stand on the plate of equipment. */
export function RatingPlate({ ratings, label }: { ratings: EquipmentRatings; label: string }) {
  const entries = ratingWords(ratings);
  if (entries.length === 0) return <Text color="inkSoft">No ratings entered</Text>;
  return (
    <Box
      as="dl"
      aria-label={label}
      display="flex"
      flexWrap="wrap"
      columnGap="5"
      rowGap="1"
      borderWidth="1px"
      borderColor="ruleStrong"
      borderRadius="3px"
      px="3"
      py="1.5"
      w="fit-content"
      maxW="full"
    >
      {entries.map(({ caption, value }) => (
        <Box key={caption}>
          <chakra.dt fontSize="xs" color="inkSoft">
            {caption}
          </chakra.dt>
          <chakra.dd fontFamily="mono" fontSize="13px" whiteSpace="nowrap">
            {value}
          </chakra.dd>
        </Box>
      ))}
    </Box>
  );
}
